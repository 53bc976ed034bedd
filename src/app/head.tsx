import { useQueryClient } from '@tanstack/react-query'
import { useTranslation } from 'react-i18next'
import { NavLink, useLocation, useNavigate } from 'react-router-dom'
import type { Account } from '../../shared/api/accounts'
import { Button } from '../components/controls/Button'
import { Menu, type MenuAction } from '../components/controls/Menu'
import { signOut } from '../features/accounts/api/signIn'

interface Place {
  path: string
  label: string
  /** Reached by a whole load: a page for readers is a document of its own. */
  document?: boolean
}

/** The line at the head of the application's pages: mark, places, and who is signed in. On a phone a menu holds them. */
export function Head({ account }: { account: Account | null | undefined }) {
  const { t } = useTranslation()
  const { pathname } = useLocation()
  const places: Place[] = [
    { path: '/guides', label: t('library'), document: true },
    { path: '/drafts', label: t('drafts') },
    ...(account?.role === 'curator'
      ? [
          { path: '/people', label: t('accounts:head.people') },
          { path: '/mail', label: t('accounts:head.mail') },
        ]
      : []),
  ]
  const leave = useSignOut()
  return (
    <header className="running-head">
      <div className="sheet">
        <a className="brand" href="/guides">
          <svg viewBox="0 0 16 16" aria-hidden="true">
            <path d="M10 1h2v6h-2z" fill="var(--oxide)" />
            <path d="M2 10V8c0-2 2.500-3 6-3s6 1 6 3v2zM1 11h14v4H1z" fill="currentColor" />
          </svg>
          {t('name')}
        </a>
        <nav aria-label={t('name')}>
          {places.map(({ path, label, document }) =>
            document === true ? (
              <a key={path} href={path}>
                {label}
              </a>
            ) : (
              <NavLink key={path} to={path}>
                {label}
              </NavLink>
            ),
          )}
        </nav>
        <div className="here">
          {account === null && pathname !== '/sign-in' && <NavLink to="/sign-in">{t('signIn')}</NavLink>}
          {account !== null && account !== undefined && (
            <>
              <NavLink to="/account">{account.name}</NavLink>
              <Button kind="quiet" className="small" onClick={() => void leave()}>
                {t('signOut')}
              </Button>
            </>
          )}
        </div>
        <PhoneMenu account={account} places={places} onSignOut={() => void leave()} />
      </div>
    </header>
  )
}

function PhoneMenu(props: { account: Account | null | undefined; places: Place[]; onSignOut: () => void }) {
  const { t } = useTranslation()
  const navigate = useNavigate()
  const go = (path: string, label: string, document = false): MenuAction => ({
    id: path,
    label,
    onAction: () => (document ? location.assign(path) : void navigate(path)),
  })
  const own: MenuAction[] =
    props.account === null || props.account === undefined
      ? [go('/sign-in', t('signIn'))]
      : [
          go('/account', props.account.name),
          { id: 'sign-out', label: t('signOut'), onAction: props.onSignOut },
        ]
  return (
    <div className="menu">
      <Menu actions={[...props.places.map((place) => go(place.path, place.label, place.document)), ...own]}>
        {t('menu')}
      </Menu>
    </div>
  )
}

/** Ends the session and forgets all that was loaded for it. */
function useSignOut(): () => Promise<void> {
  const client = useQueryClient()
  return async () => {
    await signOut()
    client.clear()
    location.assign('/sign-in?out')
  }
}
