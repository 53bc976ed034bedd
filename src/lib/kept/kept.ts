import { createStore, del, entries, set } from 'idb-keyval'

/**
 * What is kept on this device until the site has it. A browser may refuse (private windows, a full disk): then every call rejects,
 * and who asks says so to the person.
 */
const store = () => createStore('quern-kept', 'kept')
let opened: ReturnType<typeof createStore> | undefined
const place = (): ReturnType<typeof createStore> => (opened ??= store())

export const keep = (key: string, value: unknown): Promise<void> => set(key, value, place())

export const forget = (key: string): Promise<void> => del(key, place())

/** Everything kept whose key begins so. The values are as they were stored: who asks checks their shape. */
export async function keptUnder(prefix: string): Promise<{ key: string; value: unknown }[]> {
  const all = await entries<IDBValidKey, unknown>(place())
  return all.flatMap(([key, value]) =>
    typeof key === 'string' && key.startsWith(prefix) ? [{ key, value }] : [],
  )
}
