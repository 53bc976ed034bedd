import { FilesAnswer } from '../../../../shared/api/files'
import { request } from '../../../lib/request'

/** What is known of files by now. Addresses have a length: a hundred hashes at a time. */
export async function fetchFiles(hashes: readonly string[]): Promise<FilesAnswer> {
  const files: FilesAnswer['files'] = []
  for (let from = 0; from < hashes.length; from += 100) {
    const part = hashes.slice(from, from + 100).join(',')
    files.push(...(await request(`/api/files?sha256=${part}`, FilesAnswer)).files)
  }
  return { files }
}
