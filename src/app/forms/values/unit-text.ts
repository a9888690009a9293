/** A unit as it is set: `N s/m^2` with a raised 2. */
export function unitText(unit: string): string {
  return unit.replaceAll('^2', '²').replaceAll('^3', '³');
}
