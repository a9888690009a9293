import { provideZonelessChangeDetection } from '@angular/core';
import { render, screen, within } from '@testing-library/angular';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import type { Fault, Study } from '../../../shared/contracts';
import { formsProviders } from './forms-providers';
import { StudyDescription } from './study-description';

const lift: Study = {
  format: 'tareline-study',
  version: 1,
  machine: { template: 'two-mass-drive' },
  parameters: [
    { id: 'm', label: 'Payload', unit: 'kg', nominal: 300, low: 40, high: 480, minimum: 0, kind: 'use' },
    { id: 'm0', label: 'Carriage', unit: 'kg', nominal: 120 },
    { id: 'M', label: 'Drive', unit: 'kg', nominal: 180 },
    { id: 'k', label: 'Belt stiffness', unit: 'kN/m', nominal: 150, low: 120, high: 185, minimum: 0 },
    { id: 'c', label: 'Belt damping', unit: 'N s/m', nominal: 620 },
    { id: 'b', label: 'Friction', unit: 'N s/m', nominal: 200 },
    { id: 'tau', label: 'Lag of the drive', unit: 'ms', nominal: 8, low: 5, high: 11, minimum: 0.1 },
  ],
  payload: 'm',
  control: { law: 'pid', input: 'u', output: 'drive', kp: 9400, ki: 11000, kd: 4100 },
  actuator: { lag: 'tau' },
  requirements: [{ measure: 'stability' }, { measure: 'phaseMargin', atLeast: 0.7 }],
};

const custom: Study = {
  ...lift,
  machine: {
    coordinates: ['q'],
    mass: [['m0 + m']],
    damping: [['c']],
    stiffness: [['k']],
    inputs: { u: ['1'] },
    outputs: { drive: { position: ['1'] } },
  },
};

async function open(study: Study, rest: { readOnly?: boolean; faults?: readonly Fault[] } = {}) {
  const changes: Study[] = [];
  const before = JSON.stringify(study);
  const view = await render(StudyDescription, {
    inputs: { study, ...rest },
    on: { studyChange: (changed: Study) => changes.push(changed) },
    providers: [provideZonelessChangeDetection(), ...formsProviders],
  });
  return {
    view,
    last: () => changes.at(-1),
    untouched: () => JSON.stringify(study) === before,
  };
}

const field = (name: string) => screen.findByRole('textbox', { name });

async function enter(name: string, text: string): Promise<void> {
  const box = await field(name);
  await userEvent.clear(box);
  await userEvent.type(box, text);
}

describe('StudyDescription', () => {
  it('gives out a new study when a number is edited, and leaves the old one as it was', async () => {
    const { last, untouched } = await open(lift);
    await enter('Belt stiffness', '162,5');
    expect(last()?.parameters[3]).toEqual({ ...lift.parameters[3], nominal: 162.5 });
    expect(last()?.parameters[0]).toBe(lift.parameters[0]);
    expect(untouched()).toBe(true);
  });

  it('steps a number with the arrow keys, ten at a time with Shift', async () => {
    const { last } = await open(lift);
    await userEvent.type(await field('Proportional'), '{ArrowUp}{Shift>}{ArrowUp}{/Shift}');
    expect(last()?.control).toMatchObject({ kp: 9510 });
  });

  it('says what is wrong with an expression, where, and gives the draft out all the same', async () => {
    const { last } = await open(lift);
    await enter('Proportional', '2**k');
    expect(await screen.findByText('"*" has nothing before it (character 3).')).toBeTruthy();
    expect(last()?.control).toMatchObject({ kp: '2**k' });
    expect((await field('Proportional')).getAttribute('aria-invalid')).toBe('true');
    await enter('Proportional', '2*kk');
    expect(await screen.findByText('no parameter or definition is called kk (character 3).')).toBeTruthy();
  });

  it('shows faults of numbers and of the engine at their fields', async () => {
    await open(lift, { faults: [{ path: 'control.kd', message: 'makes the loop improper' }] });
    expect(await screen.findByText('Derivative makes the loop improper.')).toBeTruthy();
    await enter('Belt stiffness', '100');
    expect(await screen.findByText('Band from must not be above nominal (120 > 100).')).toBeTruthy();
  });

  it('asks again where a comma could mark thousands', async () => {
    await open(lift);
    await enter('Proportional', '1,234');
    expect(await screen.findByText(/could mean 1234 or 1\.234/)).toBeTruthy();
  });

  it('opens a parameter to its band, kind and limits', async () => {
    const { last } = await open(lift);
    expect(screen.queryByRole('textbox', { name: 'Band to' })).toBeNull();
    await userEvent.click(await screen.findByRole('button', { name: 'More of Belt damping' }));
    await enter('Band to', '800');
    expect(last()?.parameters[4]).toMatchObject({ nominal: 620, high: 800 });
  });

  it('keeps the parameters that carry over when another template is chosen', async () => {
    const { last } = await open(lift);
    const section = within(await screen.findByRole('region', { name: 'Machine' }));
    await userEvent.selectOptions(
      await section.findByRole('combobox', { name: 'Kind' }),
      'mass-spring-damper',
    );
    const study = last();
    expect(study?.machine).toEqual({ template: 'mass-spring-damper' });
    expect(study?.parameters.map(({ id }) => id)).toEqual(['m', 'm0', 'k', 'c', 'tau']);
    expect(study?.parameters[2]).toBe(lift.parameters[3]);
    expect(study?.control).toMatchObject({ input: 'u', output: 'q', kp: 9400 });
    expect(await screen.findByRole('img', { name: /stands between spring k and damper c/ })).toBeTruthy();
  });

  it('shows what the entries of an own machine give at the nominal point', async () => {
    const { last } = await open(custom);
    expect(await screen.findByText('= 420')).toBeTruthy();
    expect(screen.getByText('= 150000')).toBeTruthy();
    await enter('Stiffness, q, q', 'k +');
    expect(
      await screen.findByText(/^Stiffness, q, q: ends where a number or a name should follow/),
    ).toBeTruthy();
    expect(last()?.machine).toMatchObject({ stiffness: [['k +']] });
  });

  it('grows the matrices of an own machine with its coordinates', async () => {
    const { last } = await open(custom);
    await enter('Coordinates', 'q, r');
    await userEvent.tab();
    expect(last()?.machine).toMatchObject({
      coordinates: ['q', 'r'],
      mass: [
        ['m0 + m', '0'],
        ['0', '1'],
      ],
      inputs: { u: ['1', '0'] },
    });
    expect(await field('Mass, r, r')).toBeTruthy();
  });

  it('understands degrees and shows them beside radians', async () => {
    const { last } = await open(lift);
    await enter('Phase margin, at least', '40°');
    expect(last()?.requirements[1]).toEqual({ measure: 'phaseMargin', atLeast: '40*pi/180' });
    expect(await screen.findByText(/0\.6981.*40°/)).toBeTruthy();
  });

  it('adds and drops requirements by their ticks', async () => {
    const { last } = await open(lift);
    await userEvent.click(await screen.findByRole('checkbox', { name: 'Damping ratio' }));
    expect(last()?.requirements.map(({ measure }) => measure)).toEqual([
      'stability',
      'dampingRatio',
      'phaseMargin',
    ]);
    await userEvent.click(await screen.findByRole('checkbox', { name: 'Phase margin' }));
    expect(last()?.requirements.map(({ measure }) => measure)).toEqual(['stability', 'dampingRatio']);
  });

  it('takes hardware away with its last value', async () => {
    const { last } = await open(lift);
    await userEvent.clear(await field('Drive lag'));
    expect(last()).not.toHaveProperty('actuator');
  });

  it('shows the same to a reader, without anything to change it', async () => {
    await open(lift, { readOnly: true });
    expect(await screen.findByText('Belt stiffness')).toBeTruthy();
    expect(screen.getByText('9400')).toBeTruthy();
    expect(screen.queryAllByRole('textbox')).toEqual([]);
    expect(screen.queryAllByRole('combobox')).toEqual([]);
    expect(screen.queryAllByRole('checkbox')).toEqual([]);
    await userEvent.click(screen.getByRole('button', { name: 'More of Belt stiffness' }));
    expect(await screen.findByText('185')).toBeTruthy();
  });

  it('follows a study that changes from outside', async () => {
    const { view } = await open(lift);
    await view.rerender({
      inputs: {
        study: { ...lift, control: { law: 'pid', input: 'u', output: 'drive', kp: 1, ki: 2, kd: 3 } },
      },
      partialUpdate: true,
    });
    expect(await screen.findByDisplayValue('1')).toBe(await field('Proportional'));
  });
});
