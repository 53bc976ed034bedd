import { describe, expect, test } from 'vitest'
import { composeMail } from './composeMail'
import ar from './sentences/ar.json'
import en from './sentences/en.json'

const SITE = 'https://guides.example.org'
const WHEN = new Date('2026-12-01T10:05:00Z')

/** Every path to a sentence, so that two languages can be laid side by side. */
const paths = (value: unknown, at = ''): string[] =>
  typeof value === 'object' && value !== null
    ? Object.entries(value).flatMap(([key, inner]) => paths(inner, `${at}/${key}`))
    : [`${at} ${[...String(value).matchAll(/\{\w+\}/g)].map(String).sort().join()}`]

test('both languages say everything, with the same values in it', () => {
  expect(paths(ar)).toEqual(paths(en))
})

describe('a mail', () => {
  test('has subject, text and HTML with the whole address of its link', () => {
    const mail = composeMail('reset', { name: 'Anna', link: '/reset?token=abc&x=1' }, 'en', SITE)
    expect(mail.subject).toBe('Choose a new password')
    expect(mail.text).toContain('\n\nhttps://guides.example.org/reset?token=abc&x=1\n\n')
    expect(mail.html).toContain('href="https://guides.example.org/reset?token=abc&amp;x=1"')
  })

  test('is written from right to left in Arabic, names kept in place', () => {
    const mail = composeMail('passwordChanged', { name: 'Anna', link: '/account', when: WHEN }, 'ar', SITE)
    expect(mail.html).toContain('<html lang="ar" dir="rtl">')
    expect(mail.html).toContain('<bdi>Anna</bdi>')
    expect(mail.text).toContain('\u2068Anna\u2069')
  })

  test('names a day in the language, with the zone', () => {
    const mail = composeMail('accountDeleted', { name: 'Anna', when: WHEN }, 'en', SITE)
    expect(mail.text).toContain('1 December 2026 at 10:05 UTC')
  })

  test('falls back to English for a language that the site does not speak', () => {
    expect(composeMail('accountDeleted', { name: 'A', when: WHEN }, 'sw', SITE).language).toBe('en')
  })

  test('shows what somebody typed as text', () => {
    const values = {
      link: '/invitations/x',
      inviter: '<script>alert(1)</script>',
      guide: 'Pump & {site}',
      role: 'translator' as const,
      translationLanguage: 'ar',
    }
    const mail = composeMail('invitation', values, 'en', SITE)
    expect(mail.html).not.toContain('<script>')
    expect(mail.html).toContain('&lt;script&gt;')
    expect(mail.html).toContain('Pump &amp; {site}')
    expect(mail.text.replace(/[\u2068\u2069]/g, '')).toContain('as translator into Arabic')
  })
})
