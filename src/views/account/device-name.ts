const BROWSERS: readonly [RegExp, string][] = [
  [/Edg\//, 'Edge'], [/OPR\//, 'Opera'], [/SamsungBrowser\//, 'Samsung Internet'], [/Firefox\/|FxiOS\//, 'Firefox'],
  [/Chrome\/|CriOS\//, 'Chrome'], [/Safari\//, 'Safari'],
]
const SYSTEMS: readonly [RegExp, string][] = [
  [/iPhone/, 'iPhone'], [/iPad/, 'iPad'], [/Android/, 'Android'], [/Windows/, 'Windows'], [/Mac OS X/, 'Mac'], [/CrOS/, 'ChromeOS'], [/Linux/, 'Linux'],
]

/** "Firefox, Windows" out of what a browser says of itself; its own words where we do not know it. */
export function deviceName(userAgent: string): string {
  const find = (names: readonly [RegExp, string][]) => names.find(([sign]) => sign.test(userAgent))?.[1]
  return [find(BROWSERS), find(SYSTEMS)].filter(Boolean).join(', ') || userAgent.slice(0, 60)
}
