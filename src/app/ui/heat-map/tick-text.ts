/** A tick's label: a minus is a minus, and thousands are told apart by a thin space from five digits on. */
export function tickText(text: string): string {
  const signed = text.replace(/-/g, '\u2212');
  return signed.replace(/,/g, signed.replace(/\D/g, '').length > 4 ? '\u2009' : '');
}
