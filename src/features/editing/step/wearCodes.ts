/** Mandatory signs of ISO 7010 for what a person wears. Codes and meanings: ISO 7010:2019, table of mandatory action signs (from memory). */
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
