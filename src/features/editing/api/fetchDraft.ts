import { Draft } from '../../../../shared/api/drafts'
import { request } from '../../../lib/request'

export const fetchDraft = (guideId: string): Promise<Draft> => request(`/api/guides/${guideId}/draft`, Draft)
