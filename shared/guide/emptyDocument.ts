import type { NewId } from '../lib/ids/id'
import { SCHEMA_VERSION, type GuideDocument, type MachineKind, type Step } from './schema'

/** A guide with one section and one empty step: what a designer starts from. */
export function emptyDocument(
  newId: NewId,
  from: { lang: string; title: string; machine?: MachineKind; sectionTitle?: string },
): GuideDocument {
  return {
    schema: SCHEMA_VERSION,
    lang: from.lang,
    title: from.title,
    summary: '',
    machine: from.machine ?? 'other',
    licence: '',
    credits: [],
    front: null,
    cautions: [],
    skills: [],
    sections: [{ id: newId(), title: from.sectionTitle ?? '', steps: [emptyStep(newId)] }],
    lines: [],
    tools: [],
    figures: [],
    models: [],
    claims: [],
    sheets: [],
    assets: [],
  }
}

export function emptyStep(newId: NewId, title = ''): Step {
  return {
    id: newId(),
    title,
    body: { type: 'doc', content: [{ type: 'paragraph', attrs: { id: newId() } }] },
    uses: [],
    tools: [],
    cautions: [],
    checks: [],
    figures: [],
    models: [],
    minutes: null,
    people: 1,
  }
}
