import type { GuideDocument, Step } from './schema'

/** All steps in reading order. */
export const stepsOf = (doc: GuideDocument): Step[] => doc.sections.flatMap((section) => section.steps)
