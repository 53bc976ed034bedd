import { useTranslation } from 'react-i18next'
import type { MailState } from '../../../../shared/api/mail'

const COLOUR: Record<MailState, string> = { waiting: 'ochre', sent: 'lichen', refused: 'oxide' }

export function MailStateWord({ state }: { state: MailState }) {
  const { t } = useTranslation('mail')
  return <span className={COLOUR[state]}>{t(`states.${state}`)}</span>
}
