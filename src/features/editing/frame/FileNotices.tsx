import { useId } from 'react'
import { useTranslation } from 'react-i18next'
import { Button } from '../../../components/controls/Button'
import { Status } from '../../../components/controls/Status'
import { useSentence } from '../../../lib/useSentence'
import { useOpenDraft } from './sessionContext'
import { localeOf } from '../../../lib/localeOf'

/** Files on their way, and those that were not taken, each with its reason. */
export function FileNotices() {
  const { t } = useTranslation('editing')
  const { view, session } = useOpenDraft()
  return (
    <>
      {view.sending.map(({ id, names, share }) => (
        <Progress key={id} names={names} share={share} />
      ))}
      <Status kind="trouble">
        {view.refusedFiles.length > 0 && (
          <div className="stack">
            <p>
              <b>{t('files.refused', { count: view.refusedFiles.length })}</b>
            </p>
            <ul>
              {view.refusedFiles.map(({ name, why }, index) => (
                <li key={`${index} ${name}`}>
                  <bdi>{name}</bdi>: <Why of={why} />
                </li>
              ))}
            </ul>
            <p>
              <Button onClick={() => session.forgetRefusedFiles()}>{t('files.close')}</Button>
            </p>
          </div>
        )}
      </Status>
    </>
  )
}

function Why({ of }: { of: string | Error }) {
  const sentence = useSentence()
  return <>{typeof of === 'string' ? of : sentence(of)}</>
}

function Progress({ names, share }: { names: readonly string[]; share: number }) {
  const { t, i18n } = useTranslation('editing')
  const id = useId()
  const percent = new Intl.NumberFormat(localeOf(i18n.language), { style: 'percent' }).format(share)
  return (
    <div className="draft-notice">
      <p className="note" id={id}>
        {names.length === 1
          ? t('files.sendingOne', { name: names[0], percent })
          : t('files.sending', { count: names.length, percent })}
      </p>
      <progress className="file-progress" value={share} max={1} aria-labelledby={id} />
    </div>
  )
}
