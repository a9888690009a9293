/** √(x² + y²) without overflow or underflow of the squares. */
export function modulus(x: number, y: number): number {
  const a = Math.abs(x);
  const b = Math.abs(y);
  const larger = a > b ? a : b;
  if (larger === 0 || larger === Infinity) {
    return larger;
  }
  const ratio = (a > b ? b : a) / larger;
  return larger * Math.sqrt(1 + ratio * ratio);
}
