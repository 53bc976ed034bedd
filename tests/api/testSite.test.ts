import { afterAll, beforeAll, expect, test } from 'vitest'
import { createTestSite, type TestSite } from './testSite'

let site: TestSite
beforeAll(async () => {
  site = await createTestSite()
})
afterAll(() => site.close())

test('an unknown address of the interface is a problem, not a page', async () => {
  const answer = await site.as(null).get('/api/nowhere')
  expect(answer.status).toBe(404)
  expect(answer.problem().kind).toBe('not-found')
})

test('a body that is not JSON is a problem', async () => {
  const answer = await site.as(null).post('/api/nowhere', '{"half":')
  expect(answer.problem()).toMatchObject({ status: 400, kind: 'bad-request' })
})
