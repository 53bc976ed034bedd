import type { GuideDocument } from '../../shared/guide/schema'

/** A place in a document that names a file, with the name by which a person knows it. */
export interface FileReference {
  sha256: string
  name: string
  path: (string | number)[]
}

/** Everything in a document that names a file: its list of files, its figures and its models. */
export function fileReferences({ assets, figures, models }: GuideDocument): FileReference[] {
  const nameOf = (sha256: string): string =>
    assets.find((asset) => asset.sha256 === sha256)?.name ?? sha256.slice(0, 12)
  return [
    ...assets.map(({ sha256, name }, at) => ({ sha256, name, path: ['assets', at, 'sha256'] })),
    ...figures.flatMap(({ asset }, at) =>
      asset === null ? [] : [{ sha256: asset, name: nameOf(asset), path: ['figures', at, 'asset'] }],
    ),
    ...models.map(({ asset, name }, at) => ({
      sha256: asset,
      name: name || nameOf(asset),
      path: ['models', at, 'asset'],
    })),
  ]
}
