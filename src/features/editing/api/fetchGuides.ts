import { GuidePage } from '../../../../shared/api/guides'
import { request } from '../../../lib/request'

export const fetchGuides = (cursor: string | null): Promise<GuidePage> =>
  request(cursor === null ? '/api/guides' : `/api/guides?cursor=${encodeURIComponent(cursor)}`, GuidePage)
