/** Languages offered for a guide; any other one can be written as its tag. Codes: BCP 47. */
const TAGS = (
  'en ar es fr de pt zh hi bn ru id ms sw am ha yo ig zu so rw ln mg ne ur pa ta te mr gu kn ml si my km lo th vi tl ja ko ' +
  'fa ps ku he tr az kk uz ky tg mn it nl pl cs sk hu ro bg el sr hr sl uk sv da nb fi et lv lt ca eu gl qu gn ay ht'
).split(' ')

/** The languages by their names in the language of the interface, in its order. */
export function languageItems(language: string): { id: string; text: string }[] {
  const names = new Intl.DisplayNames(language, { type: 'language' })
  return TAGS.map((id) => ({ id, text: names.of(id) ?? id })).sort((a, b) =>
    a.text.localeCompare(b.text, language),
  )
}
