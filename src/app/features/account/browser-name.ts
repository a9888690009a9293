const BROWSERS = [
  ['Edg/', 'Edge'],
  ['OPR/', 'Opera'],
  ['Firefox/', 'Firefox'],
  ['Chrome/', 'Chrome'],
  ['Safari/', 'Safari'],
] as const;

const SYSTEMS = [
  ['Android', 'Android'],
  ['iPhone', 'iPhone'],
  ['iPad', 'iPad'],
  ['Windows', 'Windows'],
  ['Mac OS', 'macOS'],
  ['Linux', 'Linux'],
] as const;

/** "Firefox on Windows" from what a browser says of itself; the text itself where it says nothing known. */
export function browserName(userAgent: string): string {
  const browser = BROWSERS.find(([sign]) => userAgent.includes(sign))?.[1];
  const system = SYSTEMS.find(([sign]) => userAgent.includes(sign))?.[1];
  if (browser === undefined) return userAgent === '' ? 'Unknown program' : userAgent;
  return system === undefined ? browser : `${browser} on ${system}`;
}
