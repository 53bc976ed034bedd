import { useTranslation } from 'react-i18next'
import type { Understanding } from '../../../../shared/api/imports'
import { TextArea } from '../../../components/controls/TextArea'
import { TextField } from '../../../components/controls/TextField'
import type { Change } from '../changeUnderstanding'

export function FrontFields({
  understanding,
  edit,
}: {
  understanding: Understanding
  edit: (change: Change) => void
}) {
  const { t } = useTranslation('importing')
  const set = (patch: Partial<Understanding>): void => edit((before) => ({ ...before, ...patch }))
  return (
    <section className="understood-part">
      <div className="head">
        <h2>{t('front')}</h2>
      </div>
      <div className="front-fields">
        <TextField
          label={t('guideTitle')}
          value={understanding.title}
          maxLength={300}
          onChange={(event) => set({ title: event.target.value })}
        />
        <TextField
          label={t('language')}
          description={t('languageHint')}
          value={understanding.lang}
          maxLength={35}
          onChange={(event) => set({ lang: event.target.value.trim() })}
        />
        <TextField
          label={t('licence')}
          description={t('licenceHint')}
          value={understanding.licence}
          maxLength={80}
          onChange={(event) => set({ licence: event.target.value.trim() })}
        />
        <TextArea
          label={t('summary')}
          value={understanding.summary}
          maxLength={4000}
          rows={4}
          onChange={(event) => set({ summary: event.target.value })}
        />
      </div>
    </section>
  )
}
