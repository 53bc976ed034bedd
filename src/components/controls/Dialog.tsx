import type { ReactNode } from 'react'
import { Dialog as AriaDialog, Heading, Modal, ModalOverlay } from 'react-aria-components'
import { useTranslation } from 'react-i18next'
import { Button } from './Button'

export interface DialogProps {
  title: string
  open: boolean
  /** Escape, the close button, or a press beside it (unless `urgent`). */
  onClose: () => void
  children: ReactNode
  /** A question that wants an answer: a press beside it does not close it. */
  urgent?: boolean
  /** Room for a table or a picture. */
  wide?: boolean
}

/** Something to do before going on. Focus goes in, stays in, and comes back to where it was. */
export function Dialog({ title, open, onClose, children, urgent = false, wide = false }: DialogProps) {
  const { t } = useTranslation('controls')
  return (
    <ModalOverlay
      className="dialog-ground"
      isOpen={open}
      onOpenChange={(now) => !now && onClose()}
      isDismissable={!urgent}
    >
      <Modal className={wide ? 'dialog wide' : 'dialog'}>
        <AriaDialog className="dialog-sheet" role={urgent ? 'alertdialog' : 'dialog'}>
          <div className="dialog-head">
            <Heading slot="title" level={2} className="t2">
              {title}
            </Heading>
            {!urgent && (
              <Button kind="quiet" onClick={onClose}>
                {t('close')}
              </Button>
            )}
          </div>
          {children}
        </AriaDialog>
      </Modal>
    </ModalOverlay>
  )
}
