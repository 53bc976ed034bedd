/**
 * The words of a text in any script, in lower case, joined by spaces: what is put into the search index and what is asked of it are cut
 * in the same way. Scripts without spaces (Chinese, Japanese, Thai, Khmer) are cut by the dictionaries of `Intl.Segmenter`.
 */
export function words(text: string, language?: string): string[] {
  const segmenter = new Intl.Segmenter(language, { granularity: 'word' })
  return [...segmenter.segment(text)].flatMap(({ segment, isWordLike }) =>
    isWordLike === true ? [segment.toLowerCase()] : [],
  )
}

/** More words than these in one question are left out. */
const MOST_WORDS = 12

/**
 * A question in FTS5's query language: every word must be there, the last one may go on. Each word is quoted, so that nothing typed is
 * read as an operator. @returns an empty string where there is no word to look for.
 */
export function searchQuery(typed: string): string {
  const asked = words(typed).slice(0, MOST_WORDS)
  return asked
    .map((word, index) => `"${word.replaceAll('"', '""')}"${index === asked.length - 1 ? '*' : ''}`)
    .join(' ')
}
