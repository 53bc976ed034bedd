/**
 * Protective equipment that a caution can name, by the code of its mandatory sign. Its names stand under `wear` in
 * src/locales/<language>/guide.json. Source: ISO 7010:2019, checked by tests/reference/signs.test.ts.
 */
export const WEAR_CODES = [
  'M003',
  'M004',
  'M008',
  'M009',
  'M010',
  'M013',
  'M014',
  'M015',
  'M016',
  'M017',
  'M018',
  'M019',
  'M026',
] as const
