import type { ScenarioStudy } from './scenario-study';

export type ProductName = 'Lyft lift tables' | 'Skift transfer carts' | 'Stille cabins';

export interface DemoScenario extends ScenarioStudy {
  readonly name: string;
}

export interface DemoVariant {
  readonly name: string;
  /** Of the first scenario, which every variant begins with. */
  readonly study: string;
  /** Other tolerance sets of the same machine. */
  readonly further?: readonly DemoScenario[];
}

export interface DemoProduct {
  readonly name: ProductName;
  readonly description: string;
  /** In their order on the ladder. */
  readonly variants: readonly DemoVariant[];
}

/** What the maker sells; the studies stand under examples/, where the study command runs them too. */
export const range: readonly DemoProduct[] = [
  {
    name: 'Lyft lift tables',
    description: 'Column lift tables with a belt drive, a position loop on the drive and a rated payload.',
    variants: [
      {
        name: 'Short column',
        study: 'lift-table-plate',
        further: [
          {
            name: 'Worn belt and guides',
            study: 'lift-table-plate',
            label: 'Quernholm Lyft short-column lift table, worn belt and guides',
            bands: { k: { low: 165 }, c: { low: 520 }, b: { low: 40, high: 320 } },
          },
        ],
      },
      { name: 'Long column', study: 'lift-table-long-column' },
      { name: 'Telescopic column', study: 'demo/lift-table-telescopic-column' },
    ],
  },
  {
    name: 'Skift transfer carts',
    description: 'Rail-guided carts that carry pallets and tools between halls.',
    variants: [
      {
        name: 'Belt drive',
        study: 'transfer-cart-digital',
        further: [
          {
            name: 'Slower drives, second supplier',
            study: 'transfer-cart-digital',
            label: 'Quernholm Skift transfer cart, drives of the second supplier',
            bands: { dead: { high: 9 } },
          },
        ],
      },
      { name: 'Rack drive', study: 'demo/transfer-cart-rack-drive' },
      {
        name: 'Chain drive',
        study: 'demo/transfer-cart-chain-drive',
        further: [
          {
            name: 'Rerated to 5 t',
            study: 'demo/transfer-cart-chain-drive',
            label: 'Quernholm Skift transfer cart, chain drive, rerated to 5 t',
            bands: { m: { high: 5 } },
          },
        ],
      },
    ],
  },
  {
    name: 'Stille cabins',
    description: 'Actively suspended seats and cabins; the force actuator works as a damper to the sky.',
    variants: [
      {
        name: 'Driver’s seat',
        study: 'suspended-seat',
        further: [
          {
            name: 'Rerated from 55 kg',
            study: 'suspended-seat',
            label: 'Quernholm Stille suspended seat, rerated from 55 kg',
            bands: { m: { low: 55 } },
          },
        ],
      },
      { name: 'Operator cabin', study: 'demo/suspended-cabin-operator' },
      { name: 'Two-person cabin', study: 'demo/suspended-cabin-two-person' },
    ],
  },
];
