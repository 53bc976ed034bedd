import { useState, type ReactNode } from 'react'
import { useTranslation } from 'react-i18next'
import { useSearchParams } from 'react-router-dom'
import { Button } from '../../../components/controls/Button'
import { Status } from '../../../components/controls/Status'
import { useSentence } from '../../../lib/useSentence'
import { FormPage } from './FormPage'

/**
 * What a mailed link opens: one press sends its token on. Nothing happens by itself, because mail scanners open links too, and a
 * link that works once would be spent before the person sees it.
 */
export function TokenPage(props: {
  title: string
  text: string
  submit: string
  onToken: (token: string) => Promise<void>
  /** The way on when the link is spent or not whole. */
  otherwise: ReactNode
}) {
  const { t } = useTranslation('accounts')
  const sentence = useSentence()
  const [search] = useSearchParams()
  const token = search.get('token') ?? ''
  const [busy, setBusy] = useState(false)
  const [trouble, setTrouble] = useState<string | null>(token === '' ? t('byLink.missing') : null)
  const use = async (): Promise<void> => {
    setBusy(true)
    setTrouble(null)
    try {
      await props.onToken(token)
    } catch (error) {
      setTrouble(sentence(error))
      setBusy(false)
    }
  }
  return (
    <FormPage title={props.title}>
      <div className="narrow stack">
        <p>{props.text}</p>
        <Status kind="trouble">{trouble}</Status>
        <div className="actions">
          {token !== '' && (
            <Button kind="go" busy={busy} onClick={() => void use()}>
              {props.submit}
            </Button>
          )}
          {trouble !== null && props.otherwise}
        </div>
      </div>
    </FormPage>
  )
}
