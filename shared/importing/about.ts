/** What files say of themselves by their names and their first words. */

const LICENCES: [RegExp, string][] = [
  [/Apache License\s*,?\s*Version 2\.0/i, 'Apache-2.0'],
  [/GNU AFFERO GENERAL PUBLIC LICENSE\s+Version 3/i, 'AGPL-3.0-or-later'],
  [/GNU LESSER GENERAL PUBLIC LICENSE\s+Version 3/i, 'LGPL-3.0-or-later'],
  [/GNU GENERAL PUBLIC LICENSE\s+Version 3/i, 'GPL-3.0-or-later'],
  [/GNU GENERAL PUBLIC LICENSE\s+Version 2/i, 'GPL-2.0-or-later'],
  [/Permission is hereby granted, free of charge/i, 'MIT'],
  [/Neither the name of/i, 'BSD-3-Clause'],
  [/Redistribution and use in source and binary forms/i, 'BSD-2-Clause'],
  [/CERN[\s-]+Open Hardware Licen[cs]e Version 2\s*[-–]\s*Strongly/i, 'CERN-OHL-S-2.0'],
  [/CERN[\s-]+Open Hardware Licen[cs]e Version 2\s*[-–]\s*Weakly/i, 'CERN-OHL-W-2.0'],
  [/CERN[\s-]+Open Hardware Licen[cs]e Version 2\s*[-–]\s*Permissive/i, 'CERN-OHL-P-2.0'],
  [/Attribution-ShareAlike 4\.0|CC[- ]BY[- ]SA[- ]4\.0/i, 'CC-BY-SA-4.0'],
  [/Attribution 4\.0 International|CC[- ]BY[- ]4\.0/i, 'CC-BY-4.0'],
  [/CC0 1\.0|CC0-1\.0/i, 'CC0-1.0'],
]

/** The SPDX identifier of a licence's text, empty where it is none that is known. A person confirms it. */
export const licenceOf = (text: string): string =>
  LICENCES.find(([pattern]) => pattern.test(text.slice(0, 40_000)))?.[1] ?? ''

export const isLicenceFile = (path: string): boolean => /(^|\/)(licen[cs]e|copying)[^/]*$/i.test(path)

const TAGS = 'en de es fr pt it nl pl ru ar fa he tr zh cn jp ja ko ua uk cs sv hi id vi'.split(' ')
const SAME: Record<string, string> = { cn: 'zh', jp: 'ja', ua: 'uk' }

/** The language that a page's name ends with: "README_CN.md" → zh, "docs/es/build.md" → es. */
export function languageInName(path: string): { lang: string; base: string } | undefined {
  const ending = /^(.*)[_.-]([a-z]{2})(?:[-_][A-Za-z]{2,4})?(\.[a-z]+)$/i.exec(path)
  const tag = ending?.[2]?.toLowerCase()
  if (ending !== null && tag !== undefined && TAGS.includes(tag))
    return { lang: SAME[tag] ?? tag, base: `${ending[1]!}${ending[3]!}` }
  const folder = /^(.*\/)?([a-z]{2})\/([^/]+)$/.exec(path)
  if (folder !== null && TAGS.includes(folder[2]!))
    return { lang: SAME[folder[2]!] ?? folder[2]!, base: `${folder[1] ?? ''}${folder[3]!}` }
  return undefined
}

const COMMON: [string, RegExp][] = [
  ['en', /\b(the|and|with|for|this|are|from|you)\b/gi],
  ['de', /\b(der|die|das|und|mit|ist|nicht|ein|eine)\b/gi],
  ['es', /\b(el|los|las|con|para|una|del|por)\b/gi],
  ['fr', /\b(le|les|des|avec|pour|une|est|dans)\b/gi],
  ['pt', /\b(os|para|uma|não|da|em|são|você)\b/gi],
  ['it', /\b(il|gli|con|una|della|che|di)\b/gi],
]

/** The language of a text by its script or its commonest words. A suggestion. */
export function languageOf(text: string): string {
  const sample = text.slice(0, 20_000).replace(/\S*(:\/\/|[/\\])\S*/g, ' ')
  const count = (pattern: RegExp): number => sample.match(pattern)?.length ?? 0
  const letters = count(/\p{L}/gu)
  if (letters === 0) return 'en'
  if (count(/\p{Script=Arabic}/gu) > letters / 3) return 'ar'
  if (count(/[\p{Script=Hiragana}\p{Script=Katakana}]/gu) > letters / 10) return 'ja'
  if (count(/\p{Script=Han}/gu) > letters / 3) return 'zh'
  const best = COMMON.map(([lang, pattern]) => ({ lang, times: count(pattern) })).reduce((a, b) =>
    b.times > a.times ? b : a,
  )
  return best.times === 0 ? 'en' : best.lang
}

/** How many to print, where the name of a model says so: "clip-x2.stl", "2x_clip.stl", "clip_x4". */
export function numberInName(path: string): number | null {
  const name = (path.split('/').at(-1) ?? '').replace(/\.[^.]*$/, '')
  const found = /(?:^|[\s_(-])x\s?(\d{1,3})\)?$|^(\d{1,3})\s?x(?=[\s_-])|[\s_(-](\d{1,3})\s?x\)?$/i.exec(name)
  const number = Number(found?.[1] ?? found?.[2] ?? found?.[3] ?? 0)
  return number >= 1 ? number : null
}

/** The name of a model for people: "drive_motor_mount_v2.stl" → "drive motor mount v2". */
export const modelName = (path: string): string =>
  (path.split('/').at(-1) ?? path)
    .replace(/\.[^.]*$/, '')
    .replace(/^\d{1,3}\s?x[\s_-]+|[\s_-]+\(?x\s?\d{1,3}\)?$|[\s_-]+\d{1,3}\s?x$/i, '')
    .replace(/[_\s]+/g, ' ')
    .trim()
    .slice(0, 300)

/** Folders in which designs keep what is no longer current. */
export const isOld = (path: string): boolean =>
  /(^|[/_ -])(old|archive[ds]?|deprecated|legacy|obsolete|previous|outdated|alt)(?=[/_ -])/i.test(
    path.split('/').slice(0, -1).join('/') + '/',
  )
