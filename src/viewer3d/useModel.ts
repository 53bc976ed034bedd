import { useEffect, useState } from 'react'
import { disposeModel, loadModel, type Model } from './loadModel'

export type ModelState =
  { state: 'loading'; share: number } | { state: 'ready'; model: Model } | { state: 'failed' | 'damaged' }

/** Loads the model at `src`; `attempt` rises with each press on "try again". */
export function useModel(src: string, attempt: number): ModelState {
  const key = `${attempt} ${src}`
  const [loaded, setLoaded] = useState<{ key: string; value: ModelState }>()
  useEffect(() => {
    const abort = new AbortController()
    let model: Model | undefined
    const tell = (value: ModelState): void => {
      if (!abort.signal.aborted) setLoaded({ key, value })
    }
    const load = async (): Promise<void> => {
      const outcome = await loadModel(src, abort.signal, (share) => tell({ state: 'loading', share }))
      if (!outcome.ok) return tell({ state: outcome.why })
      if (abort.signal.aborted) return disposeModel(outcome.model)
      model = outcome.model
      tell({ state: 'ready', model })
    }
    void load()
    return () => {
      abort.abort()
      if (model !== undefined) disposeModel(model)
    }
  }, [src, key])
  // What was loaded for another address is not shown for this one.
  return loaded?.key === key ? loaded.value : { state: 'loading', share: 0 }
}
