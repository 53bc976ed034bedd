import type { PlacedFile } from './api/imports'

/** The files of a chooser; a chosen folder gives each its place. */
export const fromChooser = (list: FileList | null): PlacedFile[] =>
  [...(list ?? [])].map((file) => ({ path: file.webkitRelativePath || file.name, file }))

/** Everything that was dropped, folders with all that is in them. Must be called in the drop's own turn, before anything is waited for. */
export function fromDrop(data: DataTransfer): Promise<PlacedFile[]> {
  const entries = [...data.items].flatMap((item) => item.webkitGetAsEntry() ?? [])
  if (entries.length === 0) return Promise.resolve(fromChooser(data.files))
  return Promise.all(entries.map(filesOf)).then((lists) => lists.flat())
}

async function filesOf(entry: FileSystemEntry): Promise<PlacedFile[]> {
  if (isFile(entry)) {
    const file = await new Promise<File>((resolve, reject) => entry.file(resolve, reject))
    return [{ path: entry.fullPath.replace(/^\//, ''), file }]
  }
  const reader = (entry as FileSystemDirectoryEntry).createReader()
  const inside: FileSystemEntry[] = []
  // A reader gives a hundred entries at a time, and none when it has given all.
  for (;;) {
    const more = await new Promise<FileSystemEntry[]>((resolve, reject) =>
      reader.readEntries(resolve, reject),
    )
    if (more.length === 0) break
    inside.push(...more)
  }
  return (await Promise.all(inside.map(filesOf))).flat()
}

const isFile = (entry: FileSystemEntry): entry is FileSystemFileEntry => entry.isFile

/** What belongs to a working copy and not to a design. */
const LEFT_OUT = /(^|\/)(\.git|node_modules|__MACOSX)\/|(^|\/)(\.DS_Store|Thumbs\.db)$/

export const withoutClutter = (files: readonly PlacedFile[]): PlacedFile[] =>
  files.filter(({ path }) => !LEFT_OUT.test(path))
