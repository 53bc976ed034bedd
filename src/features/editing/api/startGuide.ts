import { GuideEntry, type StartGuide } from '../../../../shared/api/guides'
import { request } from '../../../lib/request'

export const startGuide = (ask: StartGuide): Promise<GuideEntry> =>
  request('/api/guides', GuideEntry, { method: 'POST', body: ask })
