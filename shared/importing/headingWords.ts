import type { ColumnMeaning } from './understanding'

/**
 * The words that head the columns of parts lists, whole (in any case), by what they mean. Counted in 65 published lists in English,
 * German, Spanish, French, Portuguese, Italian, Chinese and Japanese; Arabic from memory.
 */
const WHOLE: Partial<Record<ColumnMeaning, string>> = {
  quantity:
    'quantity|qty|qnty|quant|amount|required|数量|anz|anzahl|count|number|used qty|total qty|part quantity|bom qty|menge|stück|stückzahl|cantidad|quantité|quantita|quantità|' +
    'quantidade|qtd|qté|cant|pcs|pieces|nº|n°|no of|x|number of items|number needed|number required|needed|how many|个数|個数|الكمية|العدد',
  name:
    'part|parts|item|items|name|part name|product|product name|item description|full name|name in documentation|desc|mechanical components|3d printed parts|designation|component|components|' +
    'material|materials|部件|名称|零件|パーツ名|部品|部品名|bezeichnung|teil|bauteil|artikel|pieza|nombre|descripción|désignation|pièce|nom|peça|nome|componente|pezzo|title|thing|القطعة|الاسم',
  specification:
    'description|type|value|footprint|function|package|dimensions|dimension|size|diameter/length|spec|specs|specification|specifications|minimum specification|use|规格|说明|描述|仕様|' +
    'spezifikation|beschreibung|maße|especificación|spécification|especificação|descrição|descrizione|details|variant|colour|color|المواصفات|الوصف',
  note: 'notes|note|comments|comment|obs|remarks|remark|备注|備考|bemerkung|bemerkungen|anmerkung|observaciones|notas|remarques|osservações|observações|manufacturer|mfr|hersteller|mfg|ملاحظات',
  link: 'link|links|url|part link|suggested link|purchase link|buy|购买|shop|where to buy|web|website|address|enlace|lien|الرابط',
  reference:
    'id|designators|designator|reference|references|ref|#|item no|item number|ref-dsg|pos|position|no|refdes|reference designator|nr|المرجع',
  price:
    'price|unit cost|unit price|cost|cost per unit|单价|价格|単価|価格|preis|einzelpreis|stückpreis|precio|prix|preço|prezzo|price per unit|price each|price / item|cost per|السعر',
  supplier:
    'supplier|source|vendor|retailer|provider|preferred source|catalog|store|seller|lieferant|händler|bezugsquelle|proveedor|fournisseur|fornecedor|fornitore|供应商|المورد',
  partNumber:
    'part number|mpn|supplier number|p/n|supplier p/n|order code|code|catalog part number|supplier reference|supplier refrence|part no|sku|order number|bestellnummer|artikelnummer|' +
    'mfr part|mfr part number|manufacturer part number|mfr part / generic|mfg part number|catalog number|reference number|型号|رقم القطعة',
  total:
    'total|total price|total cost|price total|extended cost|line total|sum|subtotal|gesamt|gesamtpreis|summe|总价|合计|合計|importe|montant|المجموع',
  substitute:
    'alternative|alternatives|alternative source|substitute|substitutes|mpn 2|optional|example item|tested reference|ersatz|alternativa|替代|البديل',
  unit: 'unit|units|uom|einheit|unidad|unité|unidade|unità|单位|単位|الوحدة',
  group:
    'category|board|subsystem|part type|group|assembly|sub-assembly|subassembly|section|module|kategorie|baugruppe|分类|المجموعة',
  pack: 'vpe|pkg qty|items per pack|pack size|pack|quantity per pack|quantity per order|packet size|pack qty',
  picture: 'image|picture|photo|img|bild|imagen|图片|صورة',
  level: 'level|bom level|ebene|nivel|niveau|المستوى',
}

const exact = new Map<string, ColumnMeaning>()
for (const [meaning, words] of Object.entries(WHOLE)) {
  for (const word of words.split('|')) if (!exact.has(word)) exact.set(word, meaning as ColumnMeaning)
}

/** Where no whole heading fits, a word in it may: the first rule that does. */
const PARTS: [RegExp, ColumnMeaning][] = [
  [/\b(total|extended|line)\b.*\b(price|cost|value|eur|usd)\b|\b(price|cost)\b.*\btotal\b/, 'total'],
  [/\b(per (pack|order|bag|box)|(pack|pkg) (size|qty|quantity))\b/, 'pack'],
  [/\bprice\b|\bcost\b|单价|价格|単価|\bpreis\b|\bprecio\b|\bprix\b/, 'price'],
  [/\b(link|url|buy)\b|购买|購入/, 'link'],
  [
    /\b(part|order|catalog|item|supplier|mfr|mfg|manufacturer) ?(number|no|code|p\/n|part)\b|\bmpn\b|\bp\/n\b/,
    'partNumber',
  ],
  [/\bquantity\b|\bqty\b|数量|\banzahl\b|\bcantidad\b|\bitems per\b/, 'quantity'],
  [/^(source|supplier|vendor|retailer) ?\d$/, 'supplier'],
  [/\b(alternative|substitute)s?\b/, 'substitute'],
  [/\b(supplier|vendor|retailer)\b/, 'supplier'],
  [/\b(description|specification|dimensions?|footprint)\b/, 'specification'],
  [/\b(notes?|comments?|remarks?)\b|备注/, 'note'],
  [/\b(designators?|references?)\b/, 'reference'],
  [/\b(part|component|item|product)s?( name)?$|\bname\b/, 'name'],
]

/** In one form: lower case, without what stands in brackets, signs of money and full stops. */
export const plainHeading = (heading: string): string =>
  heading
    .normalize('NFKC')
    .toLowerCase()
    .replace(/\[([^\]]*)\]\([^)]*\)/g, '$1')
    .replace(/\([^)]*\)/g, ' ')
    .replace(
      /\bin (usd|eur|gbp|sek|rmb|cny|jpy)\b|\b(usd|eur|gbp|sek|rmb|cny|jpy|us|eu|cn|uk)\b|[€$£¥*_:.]/g,
      ' ',
    )
    .replace(/\s+/g, ' ')
    .trim()

/** What a heading means. @returns undefined for words that no list is known to use. */
export function meaningOf(heading: string): ColumnMeaning | undefined {
  const plain = plainHeading(heading)
  if (plain === '' || plain.length > 60) return undefined
  return exact.get(plain) ?? PARTS.find(([pattern]) => pattern.test(plain))?.[1]
}

/** Whether a heading is in the list as a whole: what a row of headings is known by. */
export const isKnownHeading = (heading: string): boolean => exact.has(plainHeading(heading))
