import { highWord, lowWord, powerOfTwo } from './float-bits';

const FRACTION_BITS = 1200;
const KEPT_BITS = 200;
const HALF_PI_BITS = 192;

/** floor(2^1200 · 2/π). */
const TWO_OVER_PI = BigInt(
  '0x' +
    'a2f9836e4e441529fc2757d1f534ddc0db6295993c439041fe5163abdebb' +
    'c561b7246e3a424dd2e006492eea09d1921cfe1deb1cb129a73ee88235f5' +
    '2ebb4484e99c7026b45f7e413991d639835339f49c845f8bbdf9283b1ff8' +
    '97ffde05980fef2f118b5a0a6d1f6d367ecf27cb09b74f463f669e5fea2d' +
    '7527bac7ebe5f17b3d0739f78a5292ea6bfb5fb11f8d5d0856033046fc7b',
);

/** floor(2^192 · π/2). */
const HALF_PI = BigInt('0x1921fb54442d18469898cc51701b839a252049c1114cf98e8');

const HALF = 1n << BigInt(FRACTION_BITS - 1);
const UNIT_EXPONENT = -(KEPT_BITS + HALF_PI_BITS);

/**
 * Remainder of x modulo π/2 for finite x >= 2^20: writes r = out[0] + out[1], |r| <= π/4, and
 * returns the quadrant q in 0…3 with x ≡ q·π/2 + r (mod 2π).
 *
 * Source: Payne & Hanek, "Radian reduction for trigonometric functions", SIGNUM Newsletter 18
 * (1983): x·(2/π) is needed modulo 4 only, so it is formed exactly from enough bits of 2/π. With
 * 1200 bits the fraction errs by less than 2^−176, while no double comes closer to a multiple of
 * π/2 than about 2^−61.
 */
export function reduceLargeArgument(x: number, out: Float64Array): number {
  const high = highWord(x);
  const exponent = (high >>> 20) - 1075;
  const significand = BigInt(((high & 0xfffff) | 0x100000) * 4294967296 + lowWord(x));
  const product = significand * TWO_OVER_PI;
  const shifted = exponent >= 0 ? product << BigInt(exponent) : product >> BigInt(-exponent);
  const turns = BigInt.asUintN(FRACTION_BITS + 2, shifted);
  const quadrant = (turns + HALF) >> BigInt(FRACTION_BITS);
  const fraction = turns - (quadrant << BigInt(FRACTION_BITS));
  const remainder = (fraction >> BigInt(FRACTION_BITS - KEPT_BITS)) * HALF_PI;
  const leading = Number(remainder);
  const unit = powerOfTwo(UNIT_EXPONENT);
  out[0] = leading * unit;
  out[1] = Number(remainder - BigInt(leading)) * unit;
  return Number(quadrant) & 3;
}
