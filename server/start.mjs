/**
 * What `npm start` runs: installs where packages are missing or others than the lock file says, builds where the sources are not
 * those of the last build, then becomes the server. With nothing to do it only hashes some hundred files.
 */
import { spawnSync } from 'node:child_process'
import { createHash } from 'node:crypto'
import { existsSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { fileURLToPath, pathToFileURL } from 'node:url'

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..')
const inRoot = (name) => path.join(root, name)
const STAMP = inRoot('dist/.stamp')
const ENTRY = inRoot('dist/server/main.js')
/** All that a build is made from. */
const SOURCES = [
  'src',
  'server',
  'shared',
  'fixtures',
  'vite.config.ts',
  'tsconfig.json',
  'package-lock.json',
]

function step(what, command, args, help) {
  console.log(what)
  const { status } = spawnSync(command, args, {
    cwd: root,
    stdio: ['ignore', 'inherit', 'inherit'],
    // The build needs what a server in production does not.
    env: { ...process.env, NODE_ENV: undefined },
    shell: process.platform === 'win32',
  })
  if (status === 0) return
  console.error(`Quern cannot start: ${help}`)
  process.exit(1)
}

/** npm notes what it has installed once it has finished; an install that was broken off has no such note. */
function isInstalled() {
  const note = inRoot('node_modules/.package-lock.json')
  if (!existsSync(note)) return false
  const wanted = JSON.parse(readFileSync(inRoot('package-lock.json'), 'utf8')).packages
  const present = JSON.parse(readFileSync(note, 'utf8')).packages
  return Object.entries(wanted).every(
    ([name, { version, dev, optional, devOptional, peer }]) =>
      name === '' || dev || optional || devOptional || peer || present[name]?.version === version,
  )
}

function hashOfSources() {
  const hash = createHash('sha256')
  const add = (name) => {
    const file = inRoot(name)
    hash.update(`${name}\0`).update(readFileSync(file)).update('\0')
  }
  for (const name of SOURCES) {
    if (!existsSync(inRoot(name))) continue
    if (path.extname(name) !== '') add(name)
    else for (const file of filesIn(name)) add(file)
  }
  return hash.digest('hex')
}

const filesIn = (folder) =>
  readdirSync(inRoot(folder), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && !/\.test\.tsx?$/.test(entry.name))
    .map((entry) => path.relative(root, path.join(entry.parentPath, entry.name)))
    .sort()

const [major, minor] = process.versions.node.split('.').map(Number)
if (major < 20 || (major === 20 && minor < 19)) {
  console.error(`Quern cannot start: it needs Node 20.19 or newer, and this is ${process.versions.node}.`)
  process.exit(1)
}
if (!isInstalled()) {
  step(
    'Installing packages (two to three minutes, only when they have changed) …',
    'npm',
    ['ci', '--include=dev', '--no-audit', '--no-fund'],
    'the packages could not be installed. See above; SQLite needs a C++ compiler, make and Python.',
  )
}
const sources = hashOfSources()
if (!existsSync(ENTRY) || !existsSync(STAMP) || readFileSync(STAMP, 'utf8') !== sources) {
  rmSync(STAMP, { force: true })
  step(
    'Building …',
    process.execPath,
    [inRoot('node_modules/vite/bin/vite.js'), 'build', '--app', '--logLevel', 'warn'],
    'the build failed. See above.',
  )
  writeFileSync(STAMP, sources)
}
process.env.NODE_ENV = 'production'
process.setSourceMapsEnabled(true)
await import(pathToFileURL(ENTRY).href)
