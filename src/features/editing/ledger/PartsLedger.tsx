/** The parts list as a ledger. */
export function PartsLedger() {
  return <p />
}
