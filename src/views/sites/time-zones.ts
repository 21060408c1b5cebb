/** Every zone that the browser knows, with the one it is in first. */
export function timeZones(): string[] {
  const here = Intl.DateTimeFormat().resolvedOptions().timeZone
  return [here, ...Intl.supportedValuesOf('timeZone').filter((zone) => zone !== here)]
}
