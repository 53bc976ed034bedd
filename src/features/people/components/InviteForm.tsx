import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { Invite } from '../../../../shared/api/people'
import { Button } from '../../../components/controls/Button'
import { ErrorSummary } from '../../../components/controls/ErrorSummary'
import { Status } from '../../../components/controls/Status'
import { TextField } from '../../../components/controls/TextField'
import { useRequestForm } from '../../../lib/useRequestForm'
import { useChangePeople } from '../api/guidePeople'
import { RoleFields } from './RoleFields'

export function InviteForm({ guideId }: { guideId: string }) {
  const { t } = useTranslation('people')
  const change = useChangePeople(guideId)
  const [sentTo, setSentTo] = useState<string | null>(null)
  const form = useRequestForm({
    schema: Invite,
    values: { email: '', role: 'author' as const, language: '' },
    labels: { email: t('email'), role: t('role'), language: t('language') },
    send: async (invite) => {
      setSentTo(null)
      await change.mutateAsync({ act: 'invite', invite })
      form.form.reset()
      setSentTo(invite.email)
    },
  })
  const { watch, setValue } = form.form
  const language = form.field('language')
  return (
    <form className="stack" noValidate onSubmit={form.submit}>
      <ErrorSummary {...form.summary} />
      <TextField {...form.field('email')} type="email" dir="ltr" autoComplete="off" />
      <RoleFields
        role={watch('role')}
        language={watch('language') ?? ''}
        languageId={language.id}
        languageError={language.error}
        onRole={(role) => {
          setValue('role', role)
          if (role !== 'translator') setValue('language', '')
        }}
        onLanguage={(tag) => setValue('language', tag)}
      />
      <div className="actions">
        <Button kind="go" type="submit" busy={form.busy}>
          {t('send')}
        </Button>
      </div>
      <Status kind="done">{sentTo === null ? null : t('sent', { email: sentTo })}</Status>
    </form>
  )
}
