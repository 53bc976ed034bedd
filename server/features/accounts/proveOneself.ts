import { asProblem, wrongField } from '../../auth/asProblem'
import type { Auth } from '../../auth/auth'
import { hasPassword, type SignedIn } from '../../auth/repo'
import type { Context } from '../../context'

/** The password, or the own address typed where there is none. @throws Problem bad-request naming `proof` */
export async function proveOneself(
  ctx: Context,
  auth: Auth,
  headers: Headers,
  person: SignedIn,
  proof: string,
): Promise<void> {
  if (hasPassword(ctx.db, person.id)) {
    await asProblem(auth.api.verifyPassword({ body: { password: proof }, headers }), { wrong: 'proof' })
  } else if (proof.trim().toLowerCase() !== person.email) {
    throw wrongField('proof', 'This is not the address of your account.')
  }
}
