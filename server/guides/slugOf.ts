/** Letters that Unicode does not take apart into a letter and a mark. */
const PLAIN: Record<string, string> = {
  ß: 'ss',
  æ: 'ae',
  œ: 'oe',
  ø: 'o',
  đ: 'd',
  ð: 'd',
  ł: 'l',
  þ: 'th',
  ı: 'i',
}
const LONGEST = 80

/**
 * A title as the last part of an address: Latin letters without their marks, other scripts as they are written, hyphens between
 * words. "untitled" where the title has neither letter nor digit.
 */
export function slugOf(title: string): string {
  const words = title
    .normalize('NFKD')
    .replace(/[\u0300-\u036f]/g, '')
    .normalize('NFC')
    .toLowerCase()
    .replace(/[ßæœøđðłþı]/g, (letter) => PLAIN[letter] ?? letter)
    .replace(/['’ʼ]/g, '')
    .replace(/[^\p{L}\p{M}\p{N}]+/gu, '-')
  const cut = [...words].slice(0, LONGEST).join('')
  return cut.replace(/^-+|-+$/g, '') || 'untitled'
}
