import type { Router } from 'express'
import { SayHere, type HereAnswer } from '../../../../shared/api/drafts'
import { permit } from '../../../auth/person'
import type { Context } from '../../../context'
import { readDraft } from '../../../guides/repo'
import { parseBody } from '../../../http/parse'
import { Problem } from '../../../http/problem'
import { Presence } from '../presence'

/** POST /api/guides/:guideId/draft/here: says that one is there; answers with who else is, and which version is the newest. */
export function sayHere(router: Router, ctx: Context): void {
  const presence = new Presence(ctx.now)
  router.post('/guides/:guideId/draft/here', (req, res) => {
    const { guideId, person } = permit(req, 'see', req.params.guideId)
    const { step } = parseBody(SayHere, req)
    const draft = readDraft(ctx.db, guideId)
    if (draft === undefined) throw new Problem('not-found')
    const also = presence.say(guideId, person, step)
    res.json({
      version: draft.version,
      also: also.map((other) => ({ name: other.name, step: other.step })),
    } satisfies HereAnswer)
  })
}
