import { queryOptions } from '@tanstack/react-query'
import { z } from 'zod'
import { ImportEntry, ImportStarted, ImportTaken, type Understanding } from '../../../../shared/api/imports'
import { ProblemDetails } from '../../../../shared/api/problems'
import { NoAnswer, request, RequestProblem } from '../../../lib/request'

/** A file with its place among the others, as a folder or a drop gives it. */
export interface PlacedFile {
  path: string
  file: File
}

/** An import is asked for again while the site is reading it. */
export const importQuery = (id: string) =>
  queryOptions({
    queryKey: ['import', id],
    queryFn: ({ signal }) => request(`/api/imports/${id}`, ImportEntry, { signal }),
    refetchInterval: ({ state }) => (state.data?.state === 'reading' ? 800 : false),
    staleTime: Infinity,
  })

export const changeImport = (id: string, understanding: Understanding): Promise<ImportEntry> =>
  request(`/api/imports/${id}`, ImportEntry, { method: 'PUT', body: { understanding } })

export const takeImport = (id: string): Promise<ImportTaken> =>
  request(`/api/imports/${id}/take`, ImportTaken, { method: 'POST', body: {} })

export const leaveImport = (id: string): Promise<unknown> =>
  request(`/api/imports/${id}`, z.unknown(), { method: 'DELETE' })

/**
 * Sends files with their places, telling how far it has got (0 to 1). By XMLHttpRequest: `fetch` cannot tell the progress of what it sends.
 * @throws RequestProblem for a refusal, NoAnswer without network, AbortError when given up.
 */
export function startImport(
  files: readonly PlacedFile[],
  guideId: string | undefined,
  onProgress: (share: number) => void,
  signal: AbortSignal,
): Promise<ImportStarted> {
  const form = new FormData()
  form.append('paths', JSON.stringify(files.map(({ path }) => path)))
  if (guideId !== undefined) form.append('guideId', guideId)
  for (const { file } of files) form.append('files', file)
  return new Promise((resolve, reject) => {
    const ask = new XMLHttpRequest()
    ask.open('POST', '/api/imports')
    ask.upload.onprogress = ({ loaded, total }) => onProgress(total === 0 ? 0 : loaded / total)
    ask.onerror = () => reject(new NoAnswer('There was no answer from the site.'))
    ask.onabort = () => reject(new DOMException('Given up.', 'AbortError'))
    ask.onload = () => {
      try {
        const body: unknown = JSON.parse(ask.responseText)
        if (ask.status >= 400) reject(new RequestProblem(ProblemDetails.parse(body)))
        else resolve(ImportStarted.parse(body))
      } catch (error) {
        reject(error instanceof Error ? error : new Error(String(error)))
      }
    }
    signal.addEventListener('abort', () => ask.abort(), { once: true })
    ask.send(form)
  })
}
