/** What names itself in a User-Agent, the more particular before what it also calls itself. */
const BROWSERS: readonly (readonly [RegExp, string])[] = [
  [/\bEdg(?:e|A|iOS)?\//, 'Edge'],
  [/\b(?:OPR|Opera)\//, 'Opera'],
  [/\bSamsungBrowser\//, 'Samsung Internet'],
  [/\bVivaldi\//, 'Vivaldi'],
  [/\b(?:Firefox|FxiOS)\//, 'Firefox'],
  [/\b(?:Chromium|HeadlessChrome)\//, 'Chromium'],
  [/\b(?:Chrome|CriOS)\//, 'Chrome'],
  [/\bVersion\/[\d.]+ (?:Mobile\/\w+ )?Safari\//, 'Safari'],
];
const SYSTEMS: readonly (readonly [RegExp, string])[] = [
  [/\bWindows\b/, 'Windows'],
  [/\bAndroid\b/, 'Android'],
  [/\biPad\b/, 'iPad'],
  [/\biPhone\b/, 'iPhone'],
  [/\bCrOS\b/, 'ChromeOS'],
  [/\bMac OS X\b|\bMacintosh\b/, 'macOS'],
  [/\bLinux\b/, 'Linux'],
];

const first = (list: typeof BROWSERS, text: string) => list.find(([pattern]) => pattern.test(text))?.[1];

/**
 * A browser by its User-Agent in words: "Firefox on Linux". A help to recognise one's own sessions and no more, since a
 * client may call itself what it likes.
 */
export function browserName(userAgent: string | null): string {
  const browser = first(BROWSERS, userAgent ?? '') ?? 'Unknown browser';
  const system = first(SYSTEMS, userAgent ?? '');
  return system ? `${browser} on ${system}` : browser;
}
