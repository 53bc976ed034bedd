import { existsSync, readFileSync } from 'node:fs'
import path from 'node:path'
import { describe, expect, test } from 'vitest'
import { measureMesh } from '../../shared/lib/geometry/measureMesh'
import { readStl } from '../../shared/lib/geometry/readStl'
import { weld } from '../../shared/lib/geometry/weld'

/**
 * Second opinion: `admesh -e` 0.98.4 on files of published designs. It reads in single precision, so volumes are compared to
 * 5e-5 (the sum of 19,000 rounded terms); it counts a backwards edge from both of its facets, and open edges by the facets that have one. Where it turned facets before
 * it took the volume (`mended`), only the defects are compared.
 */
interface Opinion {
  file: string
  facets: number
  open: number
  backwards: number
  volume: number
  mended?: true
}

const EXTRACTS: Opinion[] = [
  { file: 'Niskin3DPin.stl', facets: 534, open: 0, backwards: 0, volume: 697.35 },
  { file: 'OpenROVNiskinRear.stl', facets: 184, open: 0, backwards: 8, volume: 3454.08, mended: true },
]

const PRINTS = 'omni-base/3DPrintMeshes'
const PUMP = 'pump-and-microscope/HARDWARE/pump/stl'
const SCOPE = 'pump-and-microscope/HARDWARE/microscope/stl'
const DESIGNS: Opinion[] = [
  { file: `${PRINTS}/drive_motor_mount_v2.stl`, facets: 8506, open: 16, backwards: 0, volume: 15660.17 },
  { file: `${PRINTS}/wrist_camera_mount.stl`, facets: 7404, open: 0, backwards: 0, volume: 26293.67 },
  { file: `${PRINTS}/modified_base_arm.stl`, facets: 10902, open: 0, backwards: 0, volume: 136219.19 },
  { file: `${PRINTS}/base_plate_layer1.stl`, facets: 9444, open: 0, backwards: 0, volume: 247965.19 },
  {
    file: `${PRINTS}/wired_specific/cable_holder v0.stl`,
    facets: 934,
    open: 0,
    backwards: 0,
    volume: 2724.92,
  },
  {
    file: 'tank-level/cases/circular-v1/base-holder.stl',
    facets: 5690,
    open: 0,
    backwards: 0,
    volume: 116854.24,
  },
  {
    file: 'tank-level/cases/circular-v1/sensor-screw.stl',
    facets: 8920,
    open: 0,
    backwards: 0,
    volume: 19156.7,
  },
  {
    file: 'water-sampler/3D_Printer_Files/NiskinRecieverLinear.stl',
    facets: 6868,
    open: 0,
    backwards: 0,
    volume: 47911.95,
  },
  { file: `${PUMP}/Pump Base v51.stl`, facets: 15016, open: 0, backwards: 0, volume: 306018.3 },
  { file: `${PUMP}/Pump Carriage Sled v51.stl`, facets: 3786, open: 0, backwards: 0, volume: 48208.16 },
  { file: `${PUMP}/Pump Cover Slide v51.stl`, facets: 176, open: 0, backwards: 0, volume: 5112.099 },
  { file: `${SCOPE}/Scope Base v33.stl`, facets: 4500, open: 0, backwards: 0, volume: 432863.97 },
  { file: `${SCOPE}/Scope Top Stage v33.stl`, facets: 8498, open: 0, backwards: 0, volume: 109239.78 },
  {
    file: 'actuator-module/stl_files/transmission_pulley_at3_t30_output.STL',
    facets: 19054,
    open: 0,
    backwards: 0,
    volume: 5618.759,
  },
  {
    file: 'actuator-module/stl_files/encoder_codewheel_pwb_mount.STL',
    facets: 10562,
    open: 0,
    backwards: 0,
    volume: 281.1992,
  },
]

function measure(file: string) {
  const stl = readStl(readFileSync(file))
  if (!stl.ok) throw new Error(`${file}: ${stl.why}`)
  return measureMesh(weld(stl.positions))
}

function compare(folder: string, opinion: Opinion): void {
  const measures = measure(path.join(folder, opinion.file))
  expect(measures.triangles).toBe(opinion.facets)
  expect(measures.openFacets).toBe(opinion.open)
  expect(measures.backwardsEdges * 2).toBe(opinion.backwards)
  expect(measures.closed).toBe(opinion.open === 0 && opinion.backwards === 0)
  if (opinion.mended !== true && opinion.open === 0)
    expect(Math.abs(measures.volume / opinion.volume - 1)).toBeLessThan(5e-5)
}

describe('extracts kept with the project', () => {
  const folder = path.resolve('fixtures/import/models')
  test.each(EXTRACTS)('$file: as admesh has it', (opinion) => compare(folder, opinion))
})

const real = path.resolve('../shared/real')
describe.skipIf(!existsSync(real))(
  `whole designs in ${real}${existsSync(real) ? '' : ' (not there: skipped)'}`,
  () => {
    test.each(DESIGNS)('$file: as admesh has it', (opinion) => compare(real, opinion))
  },
)
