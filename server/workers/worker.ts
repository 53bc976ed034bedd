import type { AnalyseOutcome, AnalyseRequest } from '../meshes/types'
import type { PictureInspected, PictureMade, PictureRequest } from '../pictures/types'

/**
 * What the worker processes do, by name. Each function loads its libraries only when it is first asked for, so that a process that
 * looks at a picture does not load what measures solids.
 */
export async function inspectPicture(request: { file: string }): Promise<PictureInspected> {
  const { inspectPicture: inspect } = await import('../pictures/inspectPicture')
  return inspect(request.file)
}

export async function makePicture(request: PictureRequest): Promise<PictureMade> {
  const { makePicture: make } = await import('../pictures/makePicture')
  return make(request)
}

export async function analyseModel(request: AnalyseRequest): Promise<AnalyseOutcome> {
  const { analyseModel: analyse } = await import('../meshes/analyseModel')
  return analyse(request)
}
