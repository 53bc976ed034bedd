import { RevisionPage } from '../../../../shared/api/revisions'
import { request } from '../../../lib/request'

export const fetchRevisions = (guideId: string): Promise<RevisionPage> =>
  request(`/api/guides/${guideId}/revisions`, RevisionPage)
