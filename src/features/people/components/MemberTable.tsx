import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import type { GuidePeople, GuidePerson } from '../../../../shared/api/people'
import { Button } from '../../../components/controls/Button'
import { ConfirmDialog } from '../../../components/controls/ConfirmDialog'
import { Status } from '../../../components/controls/Status'
import { useChangePeople } from '../api/guidePeople'
import { ChangeRoleDialog } from './ChangeRoleDialog'
import { useRoleWords } from './roleWords'

type Held = GuidePerson['roles'][number]

export function MemberTable({ people, ownId }: { people: GuidePeople; ownId: string }) {
  const { t } = useTranslation('people')
  const roleWords = useRoleWords()
  const change = useChangePeople(people.guideId)
  const [removing, setRemoving] = useState<GuidePerson | null>(null)
  const [changing, setChanging] = useState<{ person: GuidePerson; from: Held } | null>(null)
  const [said, setSaid] = useState<string | null>(null)
  return (
    <>
      <table className="ledger fold">
        <thead>
          <tr>
            <th>{t('person')}</th>
            <th>{t('role')}</th>
            {people.mayManage && (
              <th>
                <span className="visually-hidden">{t('remove')}</span>
              </th>
            )}
          </tr>
        </thead>
        <tbody>
          {people.people.map((person) => (
            <tr key={person.userId}>
              <td>
                <span className="name">{person.name}</span>
                {person.userId === ownId && <span className="graphite"> ({t('you')})</span>}
                {person.email !== null && (
                  <small>
                    <bdi>{person.email}</bdi>
                  </small>
                )}
              </td>
              <td>
                {person.roles.map((held) => (
                  <p key={`${held.role} ${held.language}`}>
                    {roleWords(held)}{' '}
                    {people.mayManage && (
                      <Button
                        kind="quiet"
                        className="small"
                        aria-label={t('changeOf', { name: person.name })}
                        onClick={() => setChanging({ person, from: held })}
                      >
                        {t('change')}
                      </Button>
                    )}
                  </p>
                ))}
              </td>
              {people.mayManage && (
                <td className="act">
                  {person.userId !== ownId && (
                    <Button
                      kind="quiet"
                      className="small"
                      aria-label={t('removeOf', { name: person.name })}
                      onClick={() => setRemoving(person)}
                    >
                      {t('remove')}
                    </Button>
                  )}
                </td>
              )}
            </tr>
          ))}
        </tbody>
      </table>
      <Status kind="done">{said}</Status>
      {changing !== null && (
        <ChangeRoleDialog
          guideId={people.guideId}
          {...changing}
          onClose={() => setChanging(null)}
          onDone={() => {
            setChanging(null)
            setSaid(t('changed'))
          }}
        />
      )}
      <ConfirmDialog
        title={t('removeTitle', { name: removing?.name })}
        confirm={t('removeOf', { name: removing?.name })}
        open={removing !== null}
        onClose={() => setRemoving(null)}
        onConfirm={async () => {
          if (removing === null) return
          await change.mutateAsync({ act: 'remove', userId: removing.userId })
          setSaid(t('removed', { name: removing.name }))
        }}
      >
        {t('removeText', { name: removing?.name })}
      </ConfirmDialog>
    </>
  )
}
