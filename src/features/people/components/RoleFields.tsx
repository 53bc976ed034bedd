import { useTranslation } from 'react-i18next'
import { GUIDE_ROLES, type GuideRole } from '../../../../shared/access/ability'
import { RadioGroup } from '../../../components/controls/RadioGroup'
import { TextField } from '../../../components/controls/TextField'

/** A role with what it allows, and the language where it is a translator's. */
export function RoleFields(props: {
  role: GuideRole
  language: string
  languageError?: string
  languageId: string
  onRole: (role: GuideRole) => void
  onLanguage: (language: string) => void
}) {
  const { t } = useTranslation('people')
  return (
    <>
      <RadioGroup
        label={t('role')}
        value={props.role}
        onChange={(event) => {
          const role = GUIDE_ROLES.find((each) => each === event.target.value)
          if (role !== undefined) props.onRole(role)
        }}
        options={GUIDE_ROLES.map((role) => ({
          value: role,
          label: t(`roles.${role}`),
          description: t(`may.${role}`),
        }))}
      />
      {props.role === 'translator' && (
        <TextField
          id={props.languageId}
          label={t('language')}
          description={t('languageHint')}
          error={props.languageError}
          value={props.language}
          dir="ltr"
          onChange={(event) => props.onLanguage(event.target.value)}
        />
      )}
    </>
  )
}
