import { useInfiniteQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { useSearchParams } from 'react-router-dom'
import { SITE_ROLES } from '../../../../shared/access/ability'
import { Busy } from '../../../components/controls/Busy'
import { Button } from '../../../components/controls/Button'
import { EmptyState } from '../../../components/controls/EmptyState'
import { Select } from '../../../components/controls/Select'
import { Status } from '../../../components/controls/Status'
import { TextField } from '../../../components/controls/TextField'
import { localeOf } from '../../../lib/localeOf'
import { useSentence } from '../../../lib/useSentence'
import { sitePeopleQuery, useSetSiteRole } from '../api/sitePeople'

/** All accounts as a ledger, for curators. */
export function SitePeoplePage({ ownId }: { ownId: string }) {
  const { t, i18n } = useTranslation('people')
  const sentence = useSentence()
  const [params, setParams] = useSearchParams()
  const search = params.get('search') ?? ''
  const [typed, setTyped] = useState(search)
  const { data, error, hasNextPage, isFetchingNextPage, fetchNextPage } = useInfiniteQuery(
    sitePeopleQuery(search),
  )
  const setRole = useSetSiteRole()
  const [said, setSaid] = useState<string | null>(null)
  const day = new Intl.DateTimeFormat(localeOf(i18n.language), { dateStyle: 'medium' })
  const people = data?.pages.flatMap((page) => page.people)
  const roles = SITE_ROLES.map((role) => ({ value: role, label: t(`site.roles.${role}`) }))
  return (
    <div className="sheet form-page">
      <title>{`${t('site.title')} · ${t('shell:name')}`}</title>
      <h1 className="t4">{t('site.title')}</h1>
      <form
        role="search"
        className="search-line narrow mb-6"
        onSubmit={(event) => {
          event.preventDefault()
          setParams(typed === '' ? {} : { search: typed })
        }}
      >
        <TextField
          label={t('site.search')}
          type="search"
          value={typed}
          onChange={(event) => setTyped(event.target.value)}
        />
        <Button type="submit">{t('site.find')}</Button>
      </form>
      <Status kind="done">{said}</Status>
      <Status kind="trouble">
        {setRole.error !== null ? sentence(setRole.error) : error !== null ? sentence(error) : null}
      </Status>
      {people === undefined && error === null && <Busy />}
      {people?.length === 0 && <EmptyState>{t('site.none')}</EmptyState>}
      {people !== undefined && people.length > 0 && (
        <table className="ledger fold">
          <thead>
            <tr>
              <th>{t('person')}</th>
              <th>{t('role')}</th>
              <th className="r">{t('site.guides')}</th>
              <th className="r">{t('site.since')}</th>
            </tr>
          </thead>
          <tbody>
            {people.map((person) => (
              <tr key={person.id}>
                <td>
                  <span className="name">{person.name}</span>
                  <small>
                    <bdi>{person.email}</bdi>
                  </small>
                  {!person.confirmed && <small className="ochre">{t('site.unconfirmed')}</small>}
                </td>
                <td>
                  <Select
                    label={t('site.roleOf', { name: person.name })}
                    hideLabel
                    options={roles}
                    value={person.role}
                    disabled={person.id === ownId || setRole.isPending}
                    onChange={(event) => {
                      const role = SITE_ROLES.find((each) => each === event.target.value)
                      if (role === undefined) return
                      setSaid(null)
                      setRole.mutate(
                        { id: person.id, role },
                        {
                          onSuccess: () =>
                            setSaid(t('site.changed', { name: person.name, role: t(`site.roles.${role}`) })),
                        },
                      )
                    }}
                  />
                  {person.id === ownId && <small>{t('site.own')}</small>}
                </td>
                <td className="r" data-l={t('site.guides')}>
                  {person.guides}
                </td>
                <td className="r" data-l={t('site.since')}>
                  {day.format(new Date(person.createdAt))}
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
      {hasNextPage && (
        <div className="actions mt-4">
          <Button busy={isFetchingNextPage} onClick={() => void fetchNextPage()}>
            {t('site.more')}
          </Button>
        </div>
      )}
    </div>
  )
}
