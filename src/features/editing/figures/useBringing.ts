import { useEffect, useRef, useState } from 'react'
import { useTranslation } from 'react-i18next'
import type { Id } from '../../../../shared/lib/ids/id'
import { useDraft } from '../draftStore'
import { addFiles } from './addFiles'

/** Brings pictures and models into a step: those that are chosen, dropped anywhere on the page, or pasted. */
export function useBringing(stepId: Id | null): {
  bring: (files: readonly File[]) => Promise<void>
  busy: boolean
  over: boolean
} {
  const { t } = useTranslation('editingFigures')
  const { bringFiles, edit, newId, announce, readOnly } = useDraft()
  const [underWay, setUnderWay] = useState(0)
  const [over, setOver] = useState(false)

  const bring = async (files: readonly File[]): Promise<void> => {
    if (files.length === 0 || readOnly) return
    setUnderWay((count) => count + 1)
    try {
      const brought = (await bringFiles(files)).map((file) => ({ file, id: newId() }))
      edit((doc) => addFiles(doc, stepId, brought))
      const pictures = brought.filter(({ file }) => file.kind === 'picture').length
      const models = brought.length - pictures
      if (pictures > 0) announce(t('bring.pictures', { count: pictures }))
      else if (models > 0) announce(t('bring.models', { count: models }))
    } finally {
      setUnderWay((count) => count - 1)
    }
  }

  const latest = useRef(bring)
  useEffect(() => {
    latest.current = bring
  })
  useEffect(() => {
    if (readOnly) return
    const onPaste = (event: ClipboardEvent): void => {
      const files = [...(event.clipboardData?.files ?? [])].filter(isPictureOrModel)
      // Text that is copied from a spreadsheet or a web page brings its picture along; the text is meant then.
      if (
        event.defaultPrevented ||
        files.length === 0 ||
        event.clipboardData?.types.includes('text/plain') === true
      )
        return
      event.preventDefault()
      void latest.current(files)
    }
    const onDragOver = (event: DragEvent): void => {
      if (!bringsFiles(event)) return
      event.preventDefault()
      setOver(true)
    }
    const onDragLeave = (event: DragEvent): void => {
      if (event.relatedTarget === null) setOver(false)
    }
    const onDrop = (event: DragEvent): void => {
      setOver(false)
      if (event.defaultPrevented || !bringsFiles(event)) return
      event.preventDefault()
      // All that is dropped is sent: what is neither picture nor model is refused by the site with a sentence that is shown.
      void latest.current([...(event.dataTransfer?.files ?? [])])
    }
    document.addEventListener('paste', onPaste)
    document.addEventListener('dragover', onDragOver)
    document.addEventListener('dragleave', onDragLeave)
    document.addEventListener('drop', onDrop)
    return () => {
      document.removeEventListener('paste', onPaste)
      document.removeEventListener('dragover', onDragOver)
      document.removeEventListener('dragleave', onDragLeave)
      document.removeEventListener('drop', onDrop)
    }
  }, [readOnly])

  return { bring, busy: underWay > 0, over }
}

const isPictureOrModel = (file: File): boolean => file.type.startsWith('image/') || /\.stl$/i.test(file.name)

const bringsFiles = ({ dataTransfer }: DragEvent): boolean => dataTransfer?.types.includes('Files') === true
