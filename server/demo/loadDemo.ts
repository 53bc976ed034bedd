import type { Context } from '../context'

/**
 * Loads the demo library into a site without people. Called once, before the first request, with the handlers of all jobs in place.
 */
export async function loadDemo(_ctx: Context): Promise<void> {
  return Promise.resolve()
}
