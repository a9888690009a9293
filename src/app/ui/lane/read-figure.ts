export type FigureRead = { readonly value: number } | { readonly fault: string };

const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

/**
 * Reads a figure as people type it: minus or hyphen, decimal point or comma, the unit behind it or not. A comma is
 * read as the decimal sign only where it cannot separate thousands. The fault is the end of a sentence.
 */
export function readFigure(
  text: string,
  unit: string,
  range: { readonly minimum: number; readonly maximum: number },
  show: (value: number) => string,
): FigureRead {
  let figure = text.trim().replace(/\u2212/g, '-');
  if (unit !== '' && figure.endsWith(unit)) figure = figure.slice(0, -unit.length);
  figure = figure.replace(/[\s\u2009\u00a0]/g, '');
  if (figure === '') return { fault: 'needs a number' };
  if (/^[+-]?[1-9]\d{0,2},\d{3}$/.test(figure)) {
    return {
      fault: `could be read in two ways: write ${figure.replace(',', '')} or ${figure.replace(',', '.')}`,
    };
  }
  if (/^[^,.]*,[^,.]*$/.test(figure)) figure = figure.replace(',', '.');
  if (!NUMBER.test(figure)) return { fault: 'needs a number, such as 12.5' };
  const value = Number(figure);
  if (!Number.isFinite(value)) return { fault: 'needs a smaller number' };
  if (value < range.minimum) return { fault: `must not be below ${show(range.minimum)}` };
  if (value > range.maximum) return { fault: `must not be above ${show(range.maximum)}` };
  return { value };
}
