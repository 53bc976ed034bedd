import { strToU8, zip, type Zippable } from 'fflate'
import { readPerson, readUser } from '../../auth/repo'
import type { Tx } from '../../db/open'
import { Problem } from '../../http/problem'
import { listMailsTo } from '../../mail/repo'
import { listGuidesOf, listRevisionsBy, listSavedBy, listSessions, listUploadsBy } from './repo'

/**
 * Everything that the site holds of a person, as a ZIP of JSON files: the account, the drafts that they work on, the revisions that
 * they published, what they brought in, and their mail.
 */
export async function ownData(tx: Tx, userId: string): Promise<Buffer> {
  const user = readUser(tx, userId)
  if (user === undefined) throw new Problem('not-signed-in')
  const mails = listMailsTo(tx, user.email)
  const files: Zippable = {
    'account.json': json({ ...user, roles: readPerson(tx, userId)?.guides ?? [] }),
    // The token of a session opens the account, so it stays here.
    'sessions.json': json(listSessions(tx, userId, new Date(0)).map(({ token: _token, ...row }) => row)),
    'saves.json': json(listSavedBy(tx, userId)),
    'uploads.json': json(listUploadsBy(tx, userId)),
    'mails.json': json(mails.map(({ html: _html, ...mail }) => mail)),
  }
  for (const { slug, json: text } of listGuidesOf(tx, userId)) files[`drafts/${slug}.json`] = strToU8(text)
  for (const { slug, revision, json: text } of listRevisionsBy(tx, userId)) {
    files[`revisions/${slug}-${revision.label}.json`] = json({
      ...revision,
      document: JSON.parse(text) as unknown,
    })
  }
  return new Promise((resolve, reject) => {
    zip(files, (error, data) => (error === null ? resolve(Buffer.from(data)) : reject(error)))
  })
}

const json = (value: unknown): Uint8Array => strToU8(`${JSON.stringify(value, null, 2)}\n`)
