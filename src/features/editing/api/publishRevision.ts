import { RevisionEntry, type PublishRevision } from '../../../../shared/api/revisions'
import { request } from '../../../lib/request'

export const publishRevision = (
  guideId: string,
  version: number,
  ask: PublishRevision,
): Promise<RevisionEntry> =>
  request(`/api/guides/${guideId}/revisions`, RevisionEntry, {
    method: 'POST',
    body: ask,
    headers: { 'if-match': `"${version}"` },
  })
