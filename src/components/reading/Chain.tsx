/** The dimension line, chained: parts of a whole, each with its figure in the gap. */
export function Chain({
  parts,
}: {
  parts: readonly { share: number; text: string; state?: 'on' | 'now' }[]
}) {
  return (
    <div className="chain">
      {parts.map((part) => (
        <div
          key={part.text}
          className={`segment ${part.state ?? ''}`}
          style={{ flexGrow: Math.max(part.share, 0.001), flexBasis: 0 }}
        >
          <i />
          <span>{part.text}</span>
          <i />
        </div>
      ))}
    </div>
  )
}
