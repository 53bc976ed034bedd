import { UploadAnswer } from '../../../../shared/api/files'
import { ProblemDetails } from '../../../../shared/api/problems'
import { NoAnswer, RequestProblem } from '../../../lib/request'

/**
 * Sends files, telling how far it has got (0 to 1). By XMLHttpRequest: `fetch` cannot tell the progress of what it sends.
 * @throws RequestProblem for a refusal, NoAnswer without network.
 */
export function sendFiles(
  files: readonly File[],
  onProgress: (share: number) => void,
): Promise<UploadAnswer> {
  const form = new FormData()
  for (const file of files) form.append('files', file)
  return new Promise((resolve, reject) => {
    const ask = new XMLHttpRequest()
    ask.open('POST', '/api/files')
    ask.upload.onprogress = ({ loaded, total }) => onProgress(total === 0 ? 0 : loaded / total)
    ask.onerror = () => reject(new NoAnswer('There was no answer from the site.'))
    ask.onload = () => {
      try {
        const body: unknown = JSON.parse(ask.responseText)
        if (ask.status >= 400) reject(new RequestProblem(ProblemDetails.parse(body)))
        else resolve(UploadAnswer.parse(body))
      } catch (error) {
        reject(error instanceof Error ? error : new Error(String(error)))
      }
    }
    ask.send(form)
  })
}
