import type { FileEntry } from '../../../../shared/api/files'
import { findNode, insertNode, setNode } from '../../../../shared/guide/edit'
import type { Figure, GuideDocument, Model } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'

/** A file that was brought in, with the id that its figure or model gets. The id is drawn before, so that the change can be repeated. */
export interface Brought {
  file: FileEntry
  id: Id
}

/**
 * Pictures become figures at the end of the step (of the guide's front where the step is null: the last of them, in the figure that is there).
 * Models become models of the step; one that the guide has already is not listed twice.
 */
export function addFiles(doc: GuideDocument, stepId: Id | null, brought: readonly Brought[]): GuideDocument {
  return brought.reduce(
    (now, each) =>
      each.file.kind === 'picture' ? withPicture(now, stepId, each) : withModel(now, stepId, each),
    doc,
  )
}

function withPicture(doc: GuideDocument, stepId: Id | null, { file, id }: Brought): GuideDocument {
  if (stepId === null && doc.front !== null) return setNode(doc, 'figure', doc.front, { asset: file.sha256 })
  const figure: Figure = { id, kind: 'photo', asset: file.sha256, caption: '', alt: '', callouts: [] }
  const listed = insertNode(doc, 'figure', figure, null)
  return stepId === null ? { ...listed, front: id } : withInStep(listed, stepId, 'figures', id)
}

function withModel(doc: GuideDocument, stepId: Id | null, { file, id }: Brought): GuideDocument {
  const known = doc.models.find((model) => model.asset === file.sha256)
  // An STL does not say its unit; millimetres are what nearly all are in, and the row of the model asks.
  const name = file.name.replace(/\.stl$/i, '').slice(0, 300)
  const model: Model = { id, asset: file.sha256, name, unit: 'mm', material: '' }
  const listed = known === undefined ? insertNode(doc, 'model', model, null) : doc
  return stepId === null ? listed : withInStep(listed, stepId, 'models', known?.id ?? id)
}

function withInStep(doc: GuideDocument, stepId: Id, list: 'figures' | 'models', id: Id): GuideDocument {
  const step = findNode(doc, 'step', stepId)
  return step === undefined || step[list].includes(id)
    ? doc
    : setNode(doc, 'step', stepId, { [list]: [...step[list], id] })
}
