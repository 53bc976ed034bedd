/**
 * Everything that CI runs, one stage after the other; the last line counts what passed and failed. Each check counts as one, each
 * test as one. A stage that fails does not stop the later ones, but for the build, without which there is nothing to open in a browser.
 */
import { spawnSync } from 'node:child_process'
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { fileURLToPath } from 'node:url'

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..')
const reports = mkdtempSync(path.join(tmpdir(), 'quern-reports-'))
let passed = 0
let failed = 0

function run(name, command, args, env = {}) {
  console.log(`\n== ${name}`)
  const began = Date.now()
  const { status } = spawnSync(command, args, {
    cwd: root,
    stdio: 'inherit',
    env: { ...process.env, ...env },
  })
  console.log(
    `== ${name}: ${status === 0 ? 'passed' : 'FAILED'} after ${((Date.now() - began) / 1000).toFixed(0)} s`,
  )
  return status === 0
}

function check(name, command, args, env) {
  const ok = run(name, command, args, env)
  if (ok) passed += 1
  else failed += 1
  return ok
}

/** A run of vitest counts its tests; one that ends badly without a failed test (a file that does not load) counts as one failure. */
function tests(name, args) {
  const report = path.join(reports, `${name.replaceAll(' ', '-')}.json`)
  const ok = run(
    name,
    bin('vitest'),
    ['run', ...args, '--reporter=default', '--reporter=json', `--outputFile.json=${report}`],
    {
      CI: 'true',
    },
  )
  if (!existsSync(report)) {
    failed += 1
    return
  }
  const { numPassedTests, numFailedTests, numTotalTests } = JSON.parse(readFileSync(report, 'utf8'))
  passed += numPassedTests
  failed += numFailedTests
  if (numTotalTests === 0 || (!ok && numFailedTests === 0)) failed += 1
}

const bin = (name) => path.join(root, 'node_modules/.bin', name)

/** The browser tests need Chromium, from Debian's packages where it is missing. */
function chromium() {
  if (existsSync('/usr/bin/chromium')) return true
  return (
    run('package lists', 'apt-get', ['update', '-qq']) &&
    run('Chromium', 'apt-get', ['install', '-y', '-qq', '--no-install-recommends', 'chromium'], {
      DEBIAN_FRONTEND: 'noninteractive',
    })
  )
}

check('types', bin('tsc'), ['--noEmit'])
check('lint', bin('eslint'), ['.'])
check('format', bin('prettier'), ['--check', '--log-level', 'warn', '.'])
check('import rules', bin('depcruise'), ['--config', '.dependency-cruiser.cjs', 'src', 'server', 'shared'])
check('unused code', bin('knip'), [])
const built = check('build', bin('vite'), ['build', '--app', '--logLevel', 'warn'])
tests('unit and API tests', [])
if (built && chromium()) tests('browser tests', ['--config', 'tests/e2e/vitest.config.ts'])
else failed += 1

rmSync(reports, { recursive: true, force: true })
console.log(`\n${passed} passed, ${failed} failed`)
process.exit(failed === 0 ? 0 : 1)
