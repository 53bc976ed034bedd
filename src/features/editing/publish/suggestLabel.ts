/**
 * The label that follows: A → B, Z → AA, 3 → 4, 1.9 → 1.10, C2 → C3. What has no order gets none, and the designer chooses.
 * @returns "A" for the first revision, an empty text where nothing can be suggested.
 */
export function suggestLabel(last: string | null): string {
  if (last === null) return 'A'
  const number = /^(.*?)(\d+)$/.exec(last)
  if (number !== null) return `${number[1]!}${Number(number[2]) + 1}`
  if (!/^[A-Z]{1,3}$/.test(last)) return ''
  return nextLetters(last)
}

function nextLetters(letters: string): string {
  const last = letters.charCodeAt(letters.length - 1)
  const head = letters.slice(0, -1)
  if (last < 90) return head + String.fromCharCode(last + 1)
  return head === '' ? 'AA' : `${nextLetters(head)}A`
}
