import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { Link, useNavigate } from 'react-router-dom'
import type { GuidePeople } from '../../../../shared/api/people'
import { Busy } from '../../../components/controls/Busy'
import { Button } from '../../../components/controls/Button'
import { ConfirmDialog } from '../../../components/controls/ConfirmDialog'
import { FormSection } from '../../../components/controls/FormSection'
import { Status } from '../../../components/controls/Status'
import { useSentence } from '../../../lib/useSentence'
import { guidePeopleQuery, leaveGuide } from '../api/guidePeople'
import { InviteForm } from './InviteForm'
import { InvitationTable } from './InvitationTable'
import { MemberTable } from './MemberTable'

/** Who works on a guide; owners invite, change and remove, everybody can leave. */
export function GuidePeoplePage({ guideId, ownId }: { guideId: string; ownId: string }) {
  const { t } = useTranslation('people')
  const sentence = useSentence()
  const { data, error } = useQuery(guidePeopleQuery(guideId))
  return (
    <div className="sheet form-page">
      {data === undefined ? (
        error === null ? (
          <Busy />
        ) : (
          <Status kind="trouble">{sentence(error)}</Status>
        )
      ) : (
        <>
          <title>{`${t('title', { guide: data.title })} · ${t('shell:name')}`}</title>
          <p className="note">
            <Link to={`/drafts/${guideId}`}>{t('backToDraft')}</Link>
          </p>
          <h1 className="t4">{t('title', { guide: data.title })}</h1>
          <People people={data} ownId={ownId} />
        </>
      )}
    </div>
  )
}

function People({ people, ownId }: { people: GuidePeople; ownId: string }) {
  const { t } = useTranslation('people')
  const navigate = useNavigate()
  const [leaving, setLeaving] = useState(false)
  return (
    <>
      <FormSection title={t('people')} wide>
        <MemberTable people={people} ownId={ownId} />
        {people.mayLeave && (
          <div className="actions">
            <Button onClick={() => setLeaving(true)}>{t('leave')}</Button>
          </div>
        )}
      </FormSection>
      {people.invitations.length > 0 && (
        <FormSection title={t('open')} wide>
          <InvitationTable guideId={people.guideId} invitations={people.invitations} />
        </FormSection>
      )}
      {people.mayManage && (
        <FormSection title={t('invite')} side={t('inviteSide')}>
          <InviteForm guideId={people.guideId} />
        </FormSection>
      )}
      <ConfirmDialog
        title={t('leaveTitle')}
        confirm={t('leave')}
        open={leaving}
        onClose={() => setLeaving(false)}
        onConfirm={async () => {
          await leaveGuide(people.guideId)
          await navigate('/drafts')
        }}
      >
        {t('leaveText')}
      </ConfirmDialog>
    </>
  )
}
