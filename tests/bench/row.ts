/** One figure of a benchmark: ours beside a peer, measured in one run, since the machine is noisy. `ratio` is ours by peer. */
export interface BenchRow {
  bench: string
  ours: number
  peer: number
  ratio: number
  aim: number
  better: 'lower' | 'higher'
}

export const row = (
  bench: string,
  ours: number,
  peer: number,
  aim: number,
  better: BenchRow['better'],
): BenchRow => ({
  bench,
  ours: Number(ours.toPrecision(4)),
  peer: Number(peer.toPrecision(4)),
  ratio: Number((ours / peer).toPrecision(3)),
  aim,
  better,
})
