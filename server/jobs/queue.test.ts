import { pino } from 'pino'
import { afterEach, beforeEach, expect, test } from 'vitest'
import { newId } from '../context'
import { openDb } from '../db/open'
import { jobs } from '../db/schema'
import { JobQueue } from './queue'

let opened: ReturnType<typeof openDb>
let queue: JobQueue
let now = new Date('2026-05-01T08:00:00Z')
let done: string[]
beforeEach(() => {
  opened = openDb(':memory:')
  queue = new JobQueue(opened.db, pino({ level: 'silent' }), () => now, newId)
  done = []
  queue.handle<string>('note', (what) => Promise.resolve(void done.push(what)))
})
afterEach(() => opened.close())

const add = (what: string, options: Parameters<JobQueue['add']>[3] = {}): void =>
  opened.db.transaction((tx) => queue.add(tx, 'note', what, options))
const states = (): string[] =>
  opened.db
    .select()
    .from(jobs)
    .all()
    .map((job) => job.state)

test('what somebody waits for goes first, then what is due longest', async () => {
  add('later', { rank: 5 })
  add('second')
  now = new Date(now.getTime() + 1)
  add('third')
  add('not yet', { delayMs: 1000 })
  await queue.drain()
  expect(done).toEqual(['second', 'third', 'later'])
  now = new Date(now.getTime() + 1000)
  await queue.drain()
  expect(done).toEqual(['second', 'third', 'later', 'not yet'])
})

test('one key is one job while it waits; what comes while it runs is new work', async () => {
  queue.handle<string>('again', () => {
    done.push('again')
    if (done.length === 1) opened.db.transaction((tx) => queue.add(tx, 'again', 'x', { key: 'k' }))
    return Promise.resolve()
  })
  opened.db.transaction((tx) => {
    queue.add(tx, 'again', 'x', { key: 'k' })
    queue.add(tx, 'again', 'x', { key: 'k' })
  })
  await queue.drain()
  expect(done).toEqual(['again', 'again'])
})

test('a job exists only with the transaction that causes it', async () => {
  expect(() =>
    opened.db.transaction((tx) => {
      queue.add(tx, 'note', 'never')
      throw new Error('rolled back')
    }),
  ).toThrow('rolled back')
  await queue.drain()
  expect(done).toEqual([])
})

test('one that fails is tried again, later each time, and given up after its attempts', async () => {
  const givenUp: string[] = []
  let tries = 0
  queue.handle<string>('fails', () => Promise.reject(new Error(`try ${(tries += 1)}`)), {
    attempts: 3,
    giveUp: (what, error) => void givenUp.push(`${what}: ${error.message}`),
  })
  opened.db.transaction((tx) => queue.add(tx, 'fails', 'it'))
  await queue.drain()
  expect(tries).toBe(1)
  now = new Date(now.getTime() + 1000)
  await queue.drain()
  expect(tries).toBe(2)
  now = new Date(now.getTime() + 1000)
  await queue.drain()
  expect(tries).toBe(2)
  now = new Date(now.getTime() + 1000)
  await queue.drain()
  expect([tries, givenUp, states()]).toEqual([3, ['it: try 3'], ['failed']])
})

test('what a killed process left running is taken up at the start, and a stop waits for what is in hand', async () => {
  add('left')
  opened.db.update(jobs).set({ state: 'running', attempts: 1 }).run()
  let finish = (): void => undefined
  queue.handle<string>(
    'note',
    (what) => new Promise((resolve) => (finish = () => resolve(void done.push(what)))),
  )
  queue.start()
  await expect.poll(states).toEqual(['running'])
  const stopped = queue.stop()
  finish()
  await stopped
  expect([done, states()]).toEqual([['left'], ['done']])
})
