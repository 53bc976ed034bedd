import { z } from 'zod'

/**
 * Every refusal of the HTTP interface: a stable `type` (its last part), the status, and a sentence that a person can act on.
 * RFC 9457. `{name}` parts are filled from the problem's `values`. A test holds this list and the translated sentences together.
 */
export const PROBLEMS = {
  'bad-request': {
    status: 400,
    title: 'Something in the form is not right. Mend the fields that are named.',
  },
  'not-signed-in': { status: 401, title: 'Sign in first.' },
  'wrong-password': {
    status: 401,
    title: 'The address and the password do not belong together. Try again, or ask for a link by mail.',
  },
  'not-confirmed': {
    status: 403,
    title: 'This address has not been confirmed yet. Open the mail that we sent, or ask for it again.',
  },
  'link-spent': {
    status: 410,
    title: 'This link has been used or is too old. Ask for a new one.',
  },
  'not-allowed': {
    status: 403,
    title: 'You may not do this. Ask the owner of the guide for the role that you need.',
  },
  'not-found': { status: 404, title: 'There is nothing at this address, or you may not see it.' },
  stale: { status: 409, title: 'Somebody else changed this in the meantime. Load it again.' },
  'label-taken': { status: 409, title: 'This guide has a revision {label} already. Choose another label.' },
  'not-ready': {
    status: 409,
    title: 'The draft must be mended first: {count} points of the readiness list are open.',
  },
  'nothing-changed': {
    status: 409,
    title: 'Nothing has changed since revision {label}, so there is nothing to publish.',
  },
  'conflicts-open': {
    status: 409,
    title: '{count} places that two people changed are not settled yet. Settle them before publishing.',
  },
  'is-published': {
    status: 409,
    title: 'This guide has been published, and what was published stays. It cannot be removed.',
  },
  'last-owner': {
    status: 409,
    title: 'A guide needs an owner, and this is the last one. Make somebody else an owner first.',
  },
  'last-curator': {
    status: 409,
    title: 'The site needs a curator, and you are the last one. Make somebody else a curator first.',
  },
  'own-role': { status: 409, title: 'Nobody changes their own role on the site. Ask another curator.' },
  'already-member': { status: 409, title: '{email} has this role on the guide already.' },
  'not-refused': {
    status: 409,
    title: 'Only a mail that was refused can be sent again; this one is on its way or has gone.',
  },
  'other-address': {
    status: 409,
    title:
      'The invitation went to {invited}, and you are signed in as {yours}. Say whether you want to accept it all the same.',
  },
  'invitation-over': {
    status: 410,
    title: 'This invitation has been used, withdrawn or is older than 14 days. Ask for a new one.',
  },
  'etag-missing': { status: 428, title: 'Say which version you changed, in the If-Match header.' },
  'too-large': { status: 413, title: 'This file is larger than {limit}. Make it smaller, or split it.' },
  'wrong-type': { status: 415, title: 'This is not a file that can be used here: {found}. Bring {wanted}.' },
  'bad-file': { status: 422, title: '{sentence}' },
  'too-many': { status: 429, title: 'Too many requests. Wait a minute and try again.' },
  'too-many-tries': { status: 429, title: 'Too many tries. Wait {minutes} minutes and try again.' },
  'no-space': { status: 507, title: 'The disk of the site is full. Nothing was saved; tell the curator.' },
  internal: {
    status: 500,
    title: 'The site made a mistake and has noted it. Nothing was changed. Try again.',
  },
} as const satisfies Record<string, { status: number; title: string }>

export type ProblemType = keyof typeof PROBLEMS

/** A field that is wrong: its path in the request, and what to do. */
export const FieldError = z.object({ path: z.array(z.union([z.string(), z.number()])), message: z.string() })
export type FieldError = z.infer<typeof FieldError>

/** The body of an answer of application/problem+json. */
export const ProblemDetails = z.object({
  type: z.string(),
  status: z.number(),
  title: z.string(),
  values: z.record(z.string(), z.union([z.string(), z.number()])).optional(),
  errors: z.array(FieldError).optional(),
})
export type ProblemDetails = z.infer<typeof ProblemDetails>
