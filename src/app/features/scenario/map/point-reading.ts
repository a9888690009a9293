import type { NominalAnswer } from '../../../../../shared/contracts';
import { plainFigure, withUnit } from '../../../core/answers';
import type { Fact } from '../answers/answers-of';

/** All measures at one point of the map in the figures of the page. No proof: the point alone. */
export function readingFacts(answer: NominalAnswer): Fact[] {
  const facts: Fact[] = [
    { label: 'Damping ratio', text: figureOf(answer.dampingRatio) },
    { label: 'Decay rate', text: figureOf(answer.decayRate, '1/s') },
  ];
  if (!answer.stable) return [{ label: 'Loop', text: 'unstable' }, ...facts];
  const { gainMargin, phaseMargin, modulusMargin, delayMargin } = answer;
  return [
    ...facts,
    { label: 'Gain margin', text: gainText(gainMargin) },
    {
      label: 'Phase margin',
      text: phaseMargin === null ? 'unlimited' : `${rounded((phaseMargin * 180) / Math.PI)}°`,
    },
    { label: 'Modulus margin', text: figureOf(modulusMargin) },
    {
      label: 'Delay margin',
      text: delayMargin === null ? 'unlimited' : withUnit(rounded(delayMargin * 1000), 'ms'),
    },
  ];
}

function gainText(margin: NominalAnswer['gainMargin']): string {
  if (margin === null) return 'none';
  const up = margin.up === null ? 'unlimited' : `×\u00a0${rounded(margin.up)}`;
  return margin.down === null ? up : `${up}, down to ×\u00a0${rounded(margin.down)}`;
}

function figureOf(value: number | null, unit?: string): string {
  return value === null ? 'unlimited' : withUnit(rounded(value), unit);
}

function rounded(value: number): string {
  return plainFigure(Number(value.toPrecision(3)));
}
