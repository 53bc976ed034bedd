import { useTranslation } from 'react-i18next'
import { useNavigate } from 'react-router-dom'
import { useQueryClient } from '@tanstack/react-query'
import { StartGuide } from '../../../../shared/api/guides'
import { MachineKind } from '../../../../shared/guide/schema'
import { Button } from '../../../components/controls/Button'
import { Dialog } from '../../../components/controls/Dialog'
import { ErrorSummary } from '../../../components/controls/ErrorSummary'
import { Select } from '../../../components/controls/Select'
import { TextField } from '../../../components/controls/TextField'
import { useRequestForm } from '../../../lib/useRequestForm'
import { startGuide } from '../api/startGuide'
import { languageItems } from '../front/languages'
import { draftAddress } from '../frame/addresses'

/** Title, language and kind of machine: enough to begin; all of it can be changed later. */
export function StartGuideDialog({ open, onClose }: { open: boolean; onClose: () => void }) {
  const { t } = useTranslation('editing')
  return (
    <Dialog title={t('start.title')} open={open} onClose={onClose}>
      <StartForm />
    </Dialog>
  )
}

function StartForm() {
  const { t, i18n } = useTranslation('editing')
  const navigate = useNavigate()
  const queries = useQueryClient()
  const form = useRequestForm({
    schema: StartGuide,
    values: { title: '', lang: i18n.language, machine: 'other' },
    labels: { title: t('start.name'), lang: t('front.language'), machine: t('front.machine') },
    send: async (ask) => {
      const guide = await startGuide(ask)
      void queries.invalidateQueries({ queryKey: ['guides'] })
      await navigate(draftAddress(guide.id))
    },
  })
  return (
    <form className="stack" onSubmit={form.submit} noValidate>
      <ErrorSummary {...form.summary} />
      <TextField {...form.field('title')} description={t('start.nameHint')} maxLength={300} dir="auto" />
      <Select
        {...form.field('lang')}
        options={languageItems(i18n.language).map(({ id, text }) => ({ value: id, label: text }))}
      />
      <Select
        {...form.field('machine')}
        options={MachineKind.options.map((kind) => ({
          value: kind,
          label: t(`machine.${kind}`, { ns: 'guide' }),
        }))}
      />
      <div className="actions">
        <Button kind="go" type="submit" busy={form.busy}>
          {t('start.start')}
        </Button>
      </div>
    </form>
  )
}
