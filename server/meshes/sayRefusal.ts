import type { StlRefusal } from '../../shared/lib/geometry/stl'

const count = (value: number): string => value.toLocaleString('en-GB')

/** The refusal as a sentence that says what is wrong with the file and what to do. */
export function sayRefusal(refusal: StlRefusal): string {
  switch (refusal.why) {
    case 'not-stl':
      return 'This is not an STL file, though it may be named like one. Export the model as STL, binary or text.'
    case 'no-facets':
      return 'This STL holds no facets. Export the model again, with a solid in it.'
    case 'truncated':
      return refusal.promised === null
        ? `This STL breaks off after ${count(refusal.present)} facets. Bring the whole file again.`
        : `This STL promises ${count(refusal.promised)} facets and holds ${count(refusal.present)}. Bring the whole file again.`
    case 'not-finite':
      return `Facet ${count(refusal.facet)} of this STL has a corner that is no number. Mend the model and export it again.`
    case 'bad-text':
      return `Line ${count(refusal.line)} of this STL cannot be read: “${refusal.found}”. Export the model again.`
    case 'too-many':
      return `This STL has ${count(refusal.facets)} facets or more; at most ${count(refusal.limit)} can be taken. Simplify the model and export it again.`
  }
}
