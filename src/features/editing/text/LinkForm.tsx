import { useState, type FormEvent } from 'react'
import { Dialog as AriaDialog, Popover } from 'react-aria-components'
import { useTranslation } from 'react-i18next'
import { LinkAddress } from '../../../../shared/guide/schema'
import { Button } from '../../../components/controls/Button'
import { TextField } from '../../../components/controls/TextField'

export interface LinkFormProps {
  anchor: Element
  href: string
  /** Nothing is chosen in the text: the words of the link are asked for too. */
  needsWords: boolean
  onDone: (href: string, words: string) => void
  onRemove?: () => void
  onClose: () => void
}

/** "example.org/a" without a scheme is meant as an address of the web, "a@example.org" as one of mail. */
export function asAddress(typed: string): string | undefined {
  const plain = typed.trim()
  const full = /^(https?:\/\/|mailto:|#)/i.test(plain)
    ? plain
    : /^[^\s@/:]+@[^\s@/:]+\.[^\s@/:]+$/.test(plain)
      ? `mailto:${plain}`
      : /^[^\s/:]+\.[^\s/:.]{2,}(:\d+)?([/?#]\S*)?$/.test(plain)
        ? `https://${plain}`
        : plain
  return LinkAddress.safeParse(full).success ? full : undefined
}

/** Where the chosen words lead. */
export function LinkForm({ anchor, href, needsWords, onDone, onRemove, onClose }: LinkFormProps) {
  const { t } = useTranslation('editingText')
  const [typed, setTyped] = useState(href)
  const [words, setWords] = useState('')
  const [wrong, setWrong] = useState(false)
  const submit = (event: FormEvent): void => {
    event.preventDefault()
    event.stopPropagation()
    const address = asAddress(typed)
    if (address === undefined) setWrong(true)
    else onDone(address, words.trim() === '' ? typed.trim() : words.trim())
  }
  return (
    <Popover
      className="popover text-form"
      isOpen
      triggerRef={{ current: anchor }}
      onOpenChange={(open) => !open && onClose()}
      placement="bottom start"
    >
      <AriaDialog aria-label={t('link.title')} className="dialog-box">
        <form onSubmit={submit} data-own-undo>
          <TextField
            autoFocus
            label={t('link.address')}
            value={typed}
            dir="ltr"
            inputMode="url"
            placeholder="https://"
            error={wrong ? t('link.wrong') : undefined}
            onChange={(event) => {
              setTyped(event.target.value)
              setWrong(false)
            }}
          />
          {needsWords && (
            <TextField
              label={t('link.words')}
              optional
              value={words}
              onChange={(event) => setWords(event.target.value)}
            />
          )}
          <div className="actions">
            <Button kind="go" type="submit">
              {t('link.keep')}
            </Button>
            {onRemove !== undefined && <Button onClick={onRemove}>{t('link.remove')}</Button>}
          </div>
        </form>
      </AriaDialog>
    </Popover>
  )
}
