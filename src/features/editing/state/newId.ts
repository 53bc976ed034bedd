import { customAlphabet } from 'nanoid'

const letters = 'abcdefghijklmnopqrstuvwxyz'
const firstLetter = customAlphabet(letters, 1)
const rest = customAlphabet(`${letters}0123456789`, 15)

/** A lasting id: a letter, then 15 letters or digits (78 bits by chance). */
export const newId = (): string => firstLetter() + rest()
