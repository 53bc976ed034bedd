import { useMemo, useState, type ReactNode } from 'react'
import { I18nextProvider } from 'react-i18next'
import type { FileEntry } from '../../../../shared/api/files'
import { numbering } from '../../../../shared/guide/numbering'
import type { GuideDocument } from '../../../../shared/guide/schema'
import { createI18n } from '../../../lib/i18n'
import { DraftContext, type DraftAtHand } from '../draftStore'
import { OpenDraftContext, type OpenDraft } from '../frame/sessionContext'
import { newId } from '../state/newId'

export interface DraftForTestsProps {
  document: GuideDocument
  files?: readonly FileEntry[]
  readOnly?: boolean
  /** Told of every document that a change makes. */
  onDocument: (document: GuideDocument) => void
  children: ReactNode
}

/** A draft that is kept nowhere: what a part of the page does to the document can be looked at. */
export function DraftForTests({
  document: first,
  files = [],
  readOnly = false,
  onDocument,
  children,
}: DraftForTestsProps) {
  const [document, setDocument] = useState(first)
  const [said, setSaid] = useState('')
  const [i18n] = useState(() => createI18n('en'))
  const draft = useMemo<DraftAtHand>(
    () => ({
      document,
      numbers: numbering(document),
      files: new Map(files.map((file) => [file.sha256, file])),
      choices: {},
      edit: (change) =>
        setDocument((now) => {
          const next = change(now)
          onDocument(next)
          return next
        }),
      newId,
      bringFiles: () => Promise.resolve([...files]),
      announce: setSaid,
      readOnly,
    }),
    [document, files, onDocument, readOnly],
  )
  // Of the frame the parts under test only say what was done.
  const open = { sayDone: setSaid } as unknown as OpenDraft
  return (
    <I18nextProvider i18n={i18n}>
      <DraftContext.Provider value={draft}>
        <OpenDraftContext.Provider value={open}>
          {children}
          <p data-testid="said">{said}</p>
        </OpenDraftContext.Provider>
      </DraftContext.Provider>
    </I18nextProvider>
  )
}
