/**
 * Protective equipment in a circle, drawn anew after what each sign of ISO 7010 stands for; the code beside it is what counts. Codes
 * without a drawing have the circle with an exclamation mark, as the general mandatory sign has.
 */
const DRAWING: Record<string, string> = {
  M003: 'M9 18v-2a7 7 0 0 1 14 0v2M7.500 17.500h4v6h-3a1 1 0 0 1-1-1zM24.500 17.500h-4v6h3a1 1 0 0 0 1-1z',
  M004: 'M6 15h20M8.500 15v2a3.500 3.500 0 0 0 7 0v-2M16.500 15v2a3.500 3.500 0 0 0 7 0v-2',
  M008: 'M11 8h6v9l6 3c1.500.8 2 2 2 4H11z',
  M009: 'M11 25v-6l-3-4.500c-.8-1.400.9-2.500 1.900-1.200L12 16V8.700c0-1.500 2-1.500 2 0V14 7.300c0-1.500 2.100-1.500 2.100 0V14 8c0-1.500 2.100-1.500 2.100 0v6.400-4.600c0-1.400 2-1.400 2 0V19c0 2-.7 3-1.200 4v2z',
  M010: 'M12 7l4 2 4-2 5 4-2.500 4-1.500-1v11H11V14l-1.500 1L7 11z',
  M013: 'M10 9h12v9a6 7 0 0 1-12 0zM10 12H8v4h2M22 12h2v4h-2',
  M014: 'M8 19a8 8 0 0 1 16 0zM6 19h20M16 11v-1',
  M015: 'M11 7h3l2 4 2-4h3l2 4v14H9V11zM9 18h14M9 21h14',
  M016: 'M9 14c4-3 10-3 14 0v5c-4 4-10 4-14 0zM9 15l-3-1M23 15l3-1',
  M017: 'M11 9h10v6l-2 3h-6l-2-3zM13 18l-3 5h4M19 18l3 5h-4',
  M018: 'M12 7l4 7 4-7M16 14v6M12 25l4-5 4 5M11 16h10',
  M019: 'M10 7h12v11l-3 7h-6l-3-7zM12 12h8v4h-8z',
  M026: 'M13 7h6v4l3 2v12H10V13l3-2zM10 17h12',
}
const ANY = 'M16 8v11M16 22.500v2'

export function WearMark({ code }: { code: string }) {
  return (
    <svg viewBox="0 0 32 32" aria-hidden="true">
      <circle cx="16" cy="16" r="15" className="l0" />
      <path className="l1" d={DRAWING[code] ?? ANY} />
    </svg>
  )
}
