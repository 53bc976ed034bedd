import { ModelFacts, PictureFacts, type FileEntry } from '../../shared/api/files'
import type { FileRow } from './repo'

export function presentFile({ asset, renditions }: FileRow): FileEntry {
  const facts: unknown = JSON.parse(asset.facts)
  const ready = asset.state === 'ready'
  return {
    sha256: asset.sha256,
    kind: asset.kind,
    mediaType: asset.mediaType,
    bytes: asset.bytes,
    name: asset.name,
    state: asset.state,
    trouble: asset.trouble,
    picture: ready && asset.kind === 'picture' ? PictureFacts.parse(facts) : null,
    model: ready && asset.kind === 'model' ? ModelFacts.parse(facts) : null,
    renditions: renditions.map(({ name, mediaType, bytes, width, height }) => ({
      name,
      mediaType,
      bytes,
      width,
      height,
    })),
  }
}
