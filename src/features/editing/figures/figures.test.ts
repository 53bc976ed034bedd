import fc from 'fast-check'
import { expect, test } from 'vitest'
import type { FileEntry } from '../../../../shared/api/files'
import { emptyDocument } from '../../../../shared/guide/emptyDocument'
import { GuideDocument, Place } from '../../../../shared/guide/schema'
import { newId } from '../state/newId'
import { addFiles, type Brought } from './addFiles'
import { moveFigure, removeFigure } from './changeFigures'
import { droppedOn, nudged, placeUnder } from './places'

const fileOf = (kind: 'picture' | 'model', letter: string): FileEntry => ({
  sha256: letter.repeat(64),
  kind,
  mediaType: kind === 'picture' ? 'image/webp' : 'model/stl',
  bytes: 1,
  name: kind === 'picture' ? 'a.webp' : 'bracket.STL',
  state: 'working',
  trouble: null,
  picture: null,
  model: null,
  renditions: [],
})
const brought = (...files: FileEntry[]): Brought[] => files.map((file) => ({ file, id: newId() }))
const start = emptyDocument(newId, { lang: 'en', title: 'A pump' })
const step = start.sections[0]!.steps[0]!
const stepIn = (doc: GuideDocument) => doc.sections[0]!.steps[0]!

test('pictures become figures of the step in their order, models models of it', () => {
  const files = brought(fileOf('picture', 'a'), fileOf('model', 'b'), fileOf('picture', 'c'))
  const doc = addFiles(start, step.id, files)
  expect(GuideDocument.parse(doc)).toEqual(doc)
  expect(stepIn(doc).figures).toEqual([files[0]!.id, files[2]!.id])
  expect(doc.models).toMatchObject([{ name: 'bracket', unit: 'mm', asset: 'b'.repeat(64) }])
  expect(stepIn(doc).models).toEqual([files[1]!.id])
})

test('a model that the guide has is listed once', () => {
  const doc = addFiles(
    addFiles(start, step.id, brought(fileOf('model', 'b'))),
    step.id,
    brought(fileOf('model', 'b')),
  )
  expect(doc.models).toHaveLength(1)
  expect(stepIn(doc).models).toHaveLength(1)
})

test('the front has one figure; another picture takes the place of its picture', () => {
  const doc = addFiles(
    addFiles(start, null, brought(fileOf('picture', 'a'))),
    null,
    brought(fileOf('picture', 'b')),
  )
  expect(doc.figures).toMatchObject([{ id: doc.front, asset: 'b'.repeat(64) }])
})

test('figures move within their step and go with their file', () => {
  const [one, two] = brought(fileOf('picture', 'a'), fileOf('picture', 'b'))
  const doc = addFiles(start, step.id, [one!, two!])
  const moved = moveFigure(doc, step.id, one!.id, 1)
  expect(stepIn(moved).figures).toEqual([two!.id, one!.id])
  expect(moveFigure(moved, step.id, one!.id, 9)).toBe(moved)
  expect(removeFigure(doc, step.id, one!.id).figures.map(({ id }) => id)).toEqual([two!.id])
})

test('a figure that the front shows too stays in the guide', () => {
  const [one] = brought(fileOf('picture', 'a'))
  const doc = { ...addFiles(start, step.id, [one!]), front: one!.id }
  const removed = removeFigure(doc, step.id, one!.id)
  expect(removed.front).toBe(one!.id)
  expect(stepIn(removed).figures).toEqual([])
  expect(removeFigure(doc, null, one!.id)).toMatchObject({ front: null, figures: [{ id: one!.id }] })
})

test('a place is where the pointer is, in hundredths of a per cent', () => {
  expect(placeUnder({ left: 100, top: 50, width: 400, height: 200 }, 200, 150)).toEqual({ x: 2500, y: 5000 })
  expect(placeUnder({ left: 100, top: 50, width: 400, height: 200 }, 0, 900)).toEqual({ x: 0, y: 10000 })
})

test('arrow keys move by one per cent, with Shift by a tenth, and stop at the edge', () => {
  expect(nudged({ x: 500, y: 500 }, 'ArrowLeft', false)).toEqual({ x: 400, y: 500 })
  expect(nudged({ x: 500, y: 500 }, 'ArrowDown', true)).toEqual({ x: 500, y: 510 })
  expect(nudged({ x: 9990, y: 0 }, 'ArrowRight', false)).toEqual({ x: 10000, y: 0 })
  expect(nudged({ x: 0, y: 0 }, 'Enter', false)).toBeUndefined()
})

test('wherever a callout is dropped, both ends are on the picture', () => {
  const place = fc.record({ x: fc.nat(10000), y: fc.nat(10000) })
  fc.assert(
    fc.property(fc.constantFrom('balloon', 'arrow', 'dimension', 'area'), place, (shape, on) => {
      const { at, tip } = droppedOn(shape, on)
      Place.parse(at)
      Place.parse(tip)
      expect(at).not.toEqual(tip)
    }),
    { seed: 4107 },
  )
})
