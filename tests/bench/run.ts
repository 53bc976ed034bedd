import { memory } from './memory'
import { reading } from './reading'
import { benchStl } from './stl'

/** `npm run bench`: one JSON line a figure. Needs the built site, which the script makes first. Name a bench to run it alone. */
const BENCHES = { reading, stl: benchStl, memory }

const asked = process.argv.slice(2)
for (const [name, bench] of Object.entries(BENCHES)) {
  if (asked.length > 0 && !asked.includes(name)) continue
  for (const row of await bench()) console.log(JSON.stringify(row))
}
