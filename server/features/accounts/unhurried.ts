import { setTimeout as wait } from 'node:timers/promises'

/** Longer than any of the works takes, so that the time of an answer does not tell whether an address is known. */
const AT_LEAST_MS = 400

/** Does it, and answers no sooner than after a fixed time. */
export async function unhurried<Result>(work: () => Promise<Result>): Promise<Result> {
  const [outcome] = await Promise.allSettled([work(), wait(AT_LEAST_MS)])
  if (outcome.status === 'rejected') throw outcome.reason
  return outcome.value
}
