import { useId, useState, type FormEvent } from 'react'
import { useTranslation } from 'react-i18next'
import { ChangeRole, RoleOnGuide, type GuidePerson } from '../../../../shared/api/people'
import { Button } from '../../../components/controls/Button'
import { Dialog } from '../../../components/controls/Dialog'
import { Status } from '../../../components/controls/Status'
import { useFieldSentence, useSentence } from '../../../lib/useSentence'
import { useChangePeople } from '../api/guidePeople'
import { RoleFields } from './RoleFields'

/** One role of one person becomes another. */
export function ChangeRoleDialog(props: {
  guideId: string
  person: GuidePerson
  from: GuidePerson['roles'][number]
  onClose: () => void
  onDone: () => void
}) {
  const { t } = useTranslation('people')
  const id = useId()
  const sentence = useSentence()
  const fieldSentence = useFieldSentence()
  const change = useChangePeople(props.guideId)
  const [to, setTo] = useState(props.from)
  const [languageError, setLanguageError] = useState<string>()
  const submit = (event: FormEvent): void => {
    event.preventDefault()
    const checked = RoleOnGuide.safeParse(to)
    if (!checked.success) {
      setLanguageError(fieldSentence(checked.error.issues[0]?.message ?? ''))
      return
    }
    setLanguageError(undefined)
    const body = ChangeRole.parse({ from: props.from, to: checked.data })
    change.mutate({ act: 'change', userId: props.person.userId, change: body }, { onSuccess: props.onDone })
  }
  return (
    <Dialog title={t('changeOf', { name: props.person.name })} open onClose={props.onClose}>
      <form className="stack" noValidate onSubmit={submit}>
        <RoleFields
          role={to.role}
          language={to.language}
          languageId={id}
          languageError={languageError}
          onRole={(role) => setTo({ role, language: '' })}
          onLanguage={(language) => setTo({ ...to, language })}
        />
        <Status kind="trouble">{change.error === null ? null : sentence(change.error)}</Status>
        <div className="actions">
          <Button kind="go" type="submit" busy={change.isPending}>
            {t('save')}
          </Button>
        </div>
      </form>
    </Dialog>
  )
}
