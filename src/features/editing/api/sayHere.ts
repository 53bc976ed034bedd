import { HereAnswer } from '../../../../shared/api/drafts'
import { request } from '../../../lib/request'

export const sayHere = (guideId: string, step: string | null): Promise<HereAnswer> =>
  request(`/api/guides/${guideId}/draft/here`, HereAnswer, { method: 'POST', body: { step } })
