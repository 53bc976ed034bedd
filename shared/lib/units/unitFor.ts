import { UNITS, unitCodes, type UnitCode } from './units'

/** Spellings beside the symbols, in lower case: English, German, Spanish, French, Portuguese, Italian, Arabic, Chinese and Japanese lists. */
const SPELLINGS: Partial<Record<UnitCode, string>> = {
  each:
    'each ea x × pc pcs pce piece pieces off no nos nr unit units item items st stk stck stück stueck ud uds u unidad unidades un pz pza ' +
    'pzas pieza piezas pièce pièces unité unités peça peças unidade pezzo pezzi قطعة قطع حبة عدد 个 只 件 個 본 枚',
  pair: 'pairs pr prs paar paare par pares paire paires زوج أزواج 对 対',
  set: 'sets kit kits satz sätze juego juegos jeu jeux jogo jogos طقم أطقم 套',
  pack: 'packs pk pkg pkt packet packets package packages packung paquete paquetes paquet paquets pacote pacotes عبوة عبوات 包',
  roll: 'rolls reel reels rolle rollen rollo rollos rouleau rouleaux rolo rolos لفة لفات 卷',
  sheet: 'sheets blatt platte platten hoja hojas feuille feuilles folha folhas لوح ألواح 张',
  mm: 'millimetre millimetres millimeter millimeters مم ملم 毫米',
  cm: 'centimetre centimetres centimeter centimeters سم 厘米',
  m: 'metre metres meter meters mtr mtrs lfm metro metros mètre mètres م متر 米',
  km: 'kilometre kilometres kilometer kilometers كم',
  um: 'um μm micron microns micrometre micrometres micrometer micrometers',
  in: "in. inch inches zoll pulgada pulgadas pouce pouces polegada polegadas \" ″ ” '' ′′ بوصة بوصات",
  ft: "ft. foot feet fuß pie pies pied pieds ' ′ ’ قدم",
  yd: 'yd. yard yards',
  mm2: 'mm2 sqmm',
  cm2: 'cm2 sqcm',
  m2: 'm2 sqm qm',
  ft2: 'ft2 sqft sq.ft.',
  ml: 'millilitre millilitres milliliter milliliters cc مل 毫升',
  l: 'litre litres liter liters litro litros لتر لترات 升',
  m3: 'm3 cbm',
  'gal-us': 'gal gallon gallons usgal',
  g: 'gr gram grams gramme grammes gramm gramo gramos grama gramas غ غم جم غرام جرام 克',
  kg: 'kgs kilo kilos kilogram kilograms kilogramme kilogrammes كغ كغم كجم 公斤 千克',
  t: 'tonne tonnes',
  lb: 'lbs lb. pound pounds',
  oz: 'oz. ounce ounces',
  s: 'sec sec. secs second seconds ث',
  min: 'min. mins minute minutes minuto minutos دقيقة دقائق د 分',
  h: 'hr hrs hour hours std stunde stunden hora horas heure heures ساعة ساعات',
  d: 'day days tag tage día días jour jours dia dias يوم أيام',
  deg: 'deg deg. degree degrees º grad درجة',
  N: 'newton newtons',
  kN: 'kilonewton kilonewtons',
  'N.m': 'nm n·m n.m n*m newtonmetre newtonmetres',
  'lbf.ft': 'ft·lbf ft-lb ft·lb ftlb ft-lbs lb-ft lb·ft lbft',
  Pa: 'pascal pascals',
  W: 'watt watts واط',
  kW: 'kilowatt kilowatts كيلوواط',
  Wh: 'watthour watthours',
  V: 'volt volts v فولت',
  A: 'amp amps ampere amperes a أمبير',
  ohm: 'ohm ohms Ω',
  kohm: 'kohm kohms k kΩ',
  Hz: 'hertz',
  rpm: 'r/min 1/min min⁻¹ u/min',
  'l/s': 'l/sec',
  'm3/h': 'm3/h',
  degC: 'degc celsius ℃ ºc °c م°',
  degF: 'degf fahrenheit ℉ ºf °f',
  '%': 'percent pct ٪',
}

const bare = (spelling: string): string => spelling.normalize('NFC').replace(/\s+/g, '')

const bySymbol = new Map<string, UnitCode>()
const byWord = new Map<string, UnitCode>()
for (const code of unitCodes) {
  const symbol = bare(UNITS[code].symbol)
  if (symbol !== '' && !bySymbol.has(symbol)) bySymbol.set(symbol, code)
  for (const word of [...(SPELLINGS[code] ?? '').split(' '), ...(symbol.length > 1 ? [symbol] : [])]) {
    const key = word.toLowerCase()
    if (key !== '' && !byWord.has(key)) byWord.set(key, code)
  }
}

/**
 * The unit that a person's spelling means: its symbol ("mm", "µm"), else a word or another way to write it in any case ("Inches", `"`,
 * "pcs", "Stück", "قطع"). Symbols come first and keep their case, so that "h" is an hour and "K" a kelvin.
 * @returns undefined for what is no unit of a document.
 */
export function unitFor(spelling: string): UnitCode | undefined {
  const plain = bare(spelling)
  return (
    bySymbol.get(plain) ??
    byWord.get(plain.toLowerCase()) ??
    byWord.get(plain.toLowerCase().replace(/\.$/, ''))
  )
}
