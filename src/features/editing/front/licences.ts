/** Licences that designs of hardware and their instructions mostly carry, in the order in which they are offered first. */
const FIRST = [
  'CERN-OHL-S-2.0',
  'CERN-OHL-W-2.0',
  'CERN-OHL-P-2.0',
  'CC-BY-SA-4.0',
  'CC-BY-4.0',
  'CC0-1.0',
  'TAPR-OHL-1.0',
  'GPL-3.0-or-later',
  'MIT',
]

export interface Licence {
  id: string
  name: string
}

/** All of the SPDX list, the common ones first, the others by name. The list is large, so it is loaded where it is asked for. */
export async function loadLicences(): Promise<Licence[]> {
  const { default: list } = await import('spdx-license-list')
  const rank = (id: string): number => (FIRST.includes(id) ? FIRST.indexOf(id) : FIRST.length)
  return Object.entries(list)
    .map(([id, { name }]) => ({ id, name }))
    .sort((a, b) => rank(a.id) - rank(b.id) || a.name.localeCompare(b.name, 'en'))
}
