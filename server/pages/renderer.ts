import { readFileSync } from 'node:fs'
import path from 'node:path'
import compression from 'compression'
import express, { type Router } from 'express'
import type { ViteDevServer } from 'vite'
import { z } from 'zod'
import type { RenderPage } from '../../shared/api/pages'
import { rootDir } from '../db/open'
import { packedFiles } from './packedFiles'

/** How pages are rendered and where the browser's files are: built in production, from Vite's middleware in development. */
export interface Renderer {
  render: () => Promise<RenderPage>
  /** The style that stands inside each reading page, and the addresses of its small script and of its typefaces. */
  parts: () => Promise<{ style: string; script: string; fonts: string }>
  /** The whole HTML of the application's shell for this address. */
  shell: (url: string) => Promise<string>
}

const READING_STYLE = 'src/styles/reading.css'
const READER = 'src/reader/reader.ts'
const FONTS = 'src/styles/readingFonts.css'

export function viteRenderer(vite: ViteDevServer): Renderer {
  return {
    render: async () => (await vite.ssrLoadModule('/src/app/renderPage.tsx')).renderPage as RenderPage,
    parts: async () => {
      const module = (await vite.ssrLoadModule(`/${READING_STYLE}?inline`)) as { default: string }
      return { style: module.default, script: `/${READER}`, fonts: `/${FONTS}` }
    },
    shell: async (url) =>
      vite.transformIndexHtml(url, readFileSync(path.join(rootDir(), 'src/app/shell.html'), 'utf8')),
  }
}

const Manifest = z.record(z.string(), z.object({ file: z.string() }))

export function builtRenderer(router: Router): Renderer {
  const client = path.join(rootDir(), 'dist/client')
  // What the browser loads of the application is text for the most part, and large.
  router.use('/assets', compression())
  router.use(
    '/assets',
    packedFiles(path.join(client, 'assets')),
    express.static(path.join(client, 'assets'), { immutable: true, maxAge: '1y', index: false }),
  )
  const manifest = Manifest.parse(JSON.parse(readFileSync(path.join(client, '.vite/manifest.json'), 'utf8')))
  const fileOf = (entry: string): string => {
    const found = manifest[entry]
    if (found === undefined) throw new Error(`The build has no ${entry}. Build again.`)
    return found.file
  }
  const style = readFileSync(path.join(client, fileOf(READING_STYLE)), 'utf8')
  const script = `/${fileOf(READER)}`
  const fonts = `/${fileOf(FONTS)}`
  const shell = readFileSync(path.join(client, 'src/app/shell.html'), 'utf8')
  const loaded = import(path.join(rootDir(), 'dist/server/renderPage.js')) as Promise<{
    renderPage: RenderPage
  }>
  return {
    render: async () => (await loaded).renderPage,
    parts: () => Promise.resolve({ style, script, fonts }),
    shell: () => Promise.resolve(shell),
  }
}
