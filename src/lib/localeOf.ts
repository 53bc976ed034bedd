/** How dates and numbers are written in a language of the interface: its English is British. */
export const localeOf = (language: string): string => (language === 'en' ? 'en-GB' : language)
