import { useState, type ReactNode } from 'react'
import { useTranslation } from 'react-i18next'
import { useSentence } from '../../lib/useSentence'
import { Button } from './Button'
import { Dialog } from './Dialog'
import { Status } from './Status'

export interface ConfirmDialogProps {
  title: string
  /** What happens, and what cannot be brought back. */
  children: ReactNode
  /** The act in words: "Remove Mira", never "OK". */
  confirm: string
  open: boolean
  onClose: () => void
  /** Closes when it has resolved; a failure is shown and the dialog stays. */
  onConfirm: () => Promise<void> | void
}

/** Asks once, and only where undo could not bring it back. */
export function ConfirmDialog({ title, children, confirm, open, onClose, onConfirm }: ConfirmDialogProps) {
  const { t } = useTranslation('controls')
  const sentence = useSentence()
  const [busy, setBusy] = useState(false)
  const [trouble, setTrouble] = useState<string | null>(null)
  const close = (): void => {
    setTrouble(null)
    onClose()
  }
  const act = async (): Promise<void> => {
    setBusy(true)
    setTrouble(null)
    try {
      await onConfirm()
      close()
    } catch (error) {
      setTrouble(sentence(error))
    } finally {
      setBusy(false)
    }
  }
  return (
    <Dialog title={title} open={open} onClose={close} urgent>
      <div className="stack">
        <div>{children}</div>
        <Status kind="trouble">{trouble}</Status>
        <div className="actions">
          <Button kind="go" busy={busy} onClick={() => void act()}>
            {confirm}
          </Button>
          <Button onClick={close} disabled={busy}>
            {t('cancel')}
          </Button>
        </div>
      </div>
    </Dialog>
  )
}
