import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { Button } from '../../../components/controls/Button'
import { Status } from '../../../components/controls/Status'
import { useSentence } from '../../../lib/useSentence'
import { askConfirmation } from '../api/signIn'
import { FormPage } from './FormPage'

/** After signing up: what to do now, and the mail once more for whom it did not reach. */
export function LookIntoMail({ email, onOther }: { email: string; onOther: () => void }) {
  const { t } = useTranslation('accounts')
  const sentence = useSentence()
  const [state, setState] = useState<'idle' | 'busy' | 'sent'>('idle')
  const [trouble, setTrouble] = useState<string | null>(null)
  const again = async (): Promise<void> => {
    setState('busy')
    setTrouble(null)
    try {
      await askConfirmation(email)
      setState('sent')
    } catch (error) {
      setState('idle')
      setTrouble(sentence(error))
    }
  }
  return (
    <FormPage title={t('signUp.sentTitle')}>
      <div className="narrow stack">
        <p>{t('signUp.sent', { email })}</p>
        <p className="note">{t('signUp.sentHint')}</p>
        <div className="actions">
          <Button busy={state === 'busy'} onClick={() => void again()}>
            {t('signUp.again')}
          </Button>
          <Button kind="quiet" onClick={onOther}>
            {t('signUp.otherAddress')}
          </Button>
        </div>
        <Status kind="done">{state === 'sent' ? t('signUp.sentAgain') : null}</Status>
        <Status kind="trouble">{trouble}</Status>
      </div>
    </FormPage>
  )
}
