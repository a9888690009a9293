const LONGEST = 40;

/** Text from a study as it may stand in a message: quoted, on one line, cut when long. */
export function quoted(text: string): string {
  const points = Array.from(text.slice(0, 2 * LONGEST + 2));
  return JSON.stringify(points.length > LONGEST ? points.slice(0, LONGEST).join('') + '…' : text);
}
