/** Names that a browser gives for itself, the telling one first: many also claim to be their ancestors. */
const BROWSERS: [RegExp, string][] = [
  [/\bEdgA?\//, 'Edge'],
  [/\bOPR\//, 'Opera'],
  [/\bSamsungBrowser\//, 'Samsung Internet'],
  [/\b(Firefox|FxiOS)\//, 'Firefox'],
  [/(Chrome|CriOS|Chromium)\//, 'Chrome'],
  [/\bSafari\//, 'Safari'],
]
const SYSTEMS: [RegExp, string][] = [
  [/\bAndroid\b/, 'Android'],
  [/\b(iPhone|iPod)\b/, 'iPhone'],
  [/\biPad\b/, 'iPad'],
  [/\bWindows\b/, 'Windows'],
  [/\bMac OS X\b|\bMacintosh\b/, 'macOS'],
  [/\bCrOS\b/, 'ChromeOS'],
  [/\bLinux\b/, 'Linux'],
]

/** The browser and the system as people call them, so far as the browser tells. */
export function deviceOf(userAgent: string | null): { browser: string | null; system: string | null } {
  const named = (names: [RegExp, string][]): string | null =>
    names.find(([sign]) => sign.test(userAgent ?? ''))?.[1] ?? null
  return { browser: named(BROWSERS), system: named(SYSTEMS) }
}
