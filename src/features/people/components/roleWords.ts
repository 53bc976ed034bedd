import { useTranslation } from 'react-i18next'
import type { GuideRole } from '../../../../shared/access/ability'

/** "Author", "Translator into Arabic": a role on a guide in words. */
export function useRoleWords(): (held: { role: GuideRole; language: string }) => string {
  const { t, i18n } = useTranslation('people')
  return ({ role, language }) =>
    language === ''
      ? t(`roles.${role}`)
      : t('roles.translatorInto', {
          language: new Intl.DisplayNames([i18n.language], { type: 'language' }).of(language) ?? language,
        })
}
