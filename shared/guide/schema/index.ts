/** What the schema offers to the storeys above. */
export * from './caution'
export * from './condition'
export * from './document'
export * from './figure'
export * from './line'
export * from './quantity'
export * from './step'
export * from './text'
