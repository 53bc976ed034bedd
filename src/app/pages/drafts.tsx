import { Navigate, Outlet, useMatch, useParams } from 'react-router-dom'
import { useQuery } from '@tanstack/react-query'
import { accountQuery } from '../../features/accounts/api/account'
import { PartsLedger } from '../../features/editing/ledger/PartsLedger'
import { useDraft } from '../../features/editing/draftStore'
import { DraftFrame } from '../../features/editing/frame/DraftFrame'
import { PartsPage } from '../../features/editing/frame/PartsPage'
import { guideAddress, stepAddress } from '../../features/editing/frame/addresses'
import { GuidePage } from '../../features/editing/front/GuidePage'
import { DraftsPage } from '../../features/editing/list/DraftsPage'
import { stepsOf } from '../../../shared/guide/stepsOf'
import { PreviewPage } from '../../features/editing/preview/PreviewPage'
import { PublishPage } from '../../features/editing/publish/PublishPage'
import { StepPage } from '../../features/editing/step/StepPage'

/** One draft: the frame stays while the pages in it change, and with it what is unsent. */
function Draft() {
  const { guideId = '' } = useParams()
  const { data: account } = useQuery(accountQuery)
  const step = useMatch('/drafts/:guideId/steps/:stepId')
  const publish = useMatch('/drafts/:guideId/publish')
  const preview = useMatch('/drafts/:guideId/preview')
  return (
    <DraftFrame
      key={`${account?.id} ${guideId}`}
      personId={account?.id ?? ''}
      guideId={guideId}
      stepId={step?.params.stepId ?? null}
      bare={publish !== null || preview !== null}
    >
      <Outlet />
    </DraftFrame>
  )
}

/** A draft without a place: its first step, or the front page where it has none. */
function FirstPlace() {
  const { guideId = '' } = useParams()
  const { document } = useDraft()
  const first = stepsOf(document)[0]
  return (
    <Navigate replace to={first === undefined ? guideAddress(guideId) : stepAddress(guideId, first.id)} />
  )
}

function Step() {
  const { stepId = '' } = useParams()
  return <StepPage stepId={stepId} />
}

function Parts() {
  return (
    <PartsPage>
      <PartsLedger />
    </PartsPage>
  )
}

export {
  Draft,
  DraftsPage as Drafts,
  FirstPlace,
  GuidePage as Guide,
  Parts,
  PreviewPage as Preview,
  PublishPage as Publish,
  Step,
}
