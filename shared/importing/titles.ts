/** Words of headings, in the languages of published guides, by what stands under them. */

const NUMBERED =
  /^[^\p{L}\p{N}]*(?:(?:step|schritt|paso|étape|etape|passo|passaggio|الخطوة|خطوة|ステップ)\s*[\d٠-٩]+\b|第?\s*\d+\s*步|步骤\s*\d+|\d+(?:\.\d+)*\s*[.:)、]\s*\S|\d+\.\d+\s+\S)/iu

/** "1. Bellows", "Step 3", "5: Attach cameras"; not "3D printing", not "12V version". */
export const isNumbered = (title: string): boolean => NUMBERED.test(title)

/** A title without its number, its emoji at the ends and its colon. */
export function bareTitle(title: string): string {
  const bare = title
    .replace(/:[a-z_]+:/g, ' ')
    .replace(/[\p{Extended_Pictographic}\u200d\ufe0f\u{1f3fb}-\u{1f3ff}]+/gu, ' ')
    .replace(/^[^\p{L}\p{N}("“«]+/u, '')
    .replace(
      /^(?:(?:step|schritt|paso|étape|etape|passo|passaggio|الخطوة|خطوة|ステップ)\s*[\d٠-٩]+|第?\s*\d+\s*步|步骤\s*\d+|\d+(?:\.\d+)*(?=\s*[.:)、]))\s*[.:)、–-]*\s*/iu,
      '',
    )
    .replace(/\s+/g, ' ')
    .replace(/\s*:$/, '')
    .trim()
  return (bare === '' ? title.trim() : bare).slice(0, 300)
}

/** What is no part of building: about the project, its people, its programs. */
export const isAside = (title: string): boolean =>
  /licen[cs]|contribut|more (details|information)|copyright|^description$|credit|acknowledg|reference|resource|media|conduct|contact|support us|faq|change ?log|citation|cite|sponsor|table of contents|^contents$|footnote|background|overview|status|related|community|star history|roadmap|\bto.?do\b|what'?s in|what is included|authors?$|gallery|diagram|total cost|software|firmware|why |choosing|news|tl;?dr|motivation|introduction|disclaimer|fu(ß|ss)note|lizenz|licencia|licença|致谢|许可|引用|概述|رخصة/i.test(
    title,
  ) && !/assembl|build (instr|proc|step|guide)|montage|aufbau/i.test(title)

export const isPartsTitle = (title: string): boolean =>
  /\bparts\b(?! (list )?assembly)|materials?\b|bill of materials|\bbom\b|components needed|hardware list|what you (will )?need|you will need|shopping list|stückliste|\bteile\b|materialien|materiales|piezas|matériel|pièces|\bpeças|materiais|materiali|材料|部件|清单|المواد|القطع/i.test(
    title,
  ) && !/print the|prepar|mount|install|remove/i.test(title)

export const isToolsTitle = (title: string): boolean =>
  /\btools?\b|werkzeug|herramientas|outils|ferramentas|attrezzi|工具|أدوات/i.test(title) &&
  !/prepar|making|build/i.test(title)

/** "Option 2", "Alternative B", "For the 12V version". */
export const isChoice = (text: string): boolean =>
  /^\W*(option|alternative|variant|variante|opción|الخيار)\s*[\dA-H]\b|^\W*for the\b.{1,40}\b(version|variant|build|model)\b|^\W*\S{1,20}\s+version\b/i.test(
    text,
  )

/** Words that begin a list of what a step takes in hand. */
export const isPartsLabel = (text: string): boolean =>
  /^(parts|components|materials?|hardware|you need|you will need|required( parts| materials)?|parts needed|needed( parts)?|teile|material|piezas|materiales|pièces|matériel|peças|materiais|pezzi|部件|材料|零件|القطع)\s*:?$/i.test(
    text.trim(),
  )
