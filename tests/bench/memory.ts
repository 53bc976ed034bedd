import { request } from 'node:http'
import { setTimeout as wait } from 'node:timers/promises'
import { ServerProcess } from '../faults/serverProcess'

/** Limits that the project sets itself; there is no other program to compare with, so `peer` is the limit. */
const IDLE_MB = 250
const RISE_MB = 50
const FACETS = 2_000_000

interface Row {
  bench: string
  ours: number
  peer: number
  ratio: number
  aim: number
  better: 'lower'
}

/** Resident memory of the built server's process: idle, and how far an upload of 100 MB raises it. Needs `vite build --app`. */
export async function memory(): Promise<Row[]> {
  const server = await ServerProcess.start({ built: true })
  try {
    await server.client.get('/api/guides')
    await server.client.get('/guides')
    await wait(3000)
    const before = server.memory().now
    let most = before
    const watching = setInterval(() => (most = Math.max(most, server.memory().now)), 20)
    await sendModel(server)
    // The model is measured in a process of its own; what the server does meanwhile counts.
    for (let tries = 0; tries < 600 && !isDone(server); tries += 1) await wait(100)
    clearInterval(watching)
    return [
      row('idle server, resident MB (beside its limit)', toMb(before), IDLE_MB),
      row('rise by an upload of 100 MB, resident MB (beside its limit)', toMb(most - before), RISE_MB),
    ]
  } finally {
    await server.stop()
  }
}

const toMb = (kib: number): number => Math.round((kib / 1024) * 10) / 10
const row = (bench: string, ours: number, peer: number): Row => ({
  bench,
  ours,
  peer,
  ratio: Math.round((ours / peer) * 100) / 100,
  aim: 1,
  better: 'lower',
})

const isDone = (server: ServerProcess): boolean =>
  server.rows<{ state: string }>('select state from asset').every(({ state }) => state !== 'working')

/** A wavy sheet of two million facets, made as it is sent. */
function sendModel(server: ServerProcess): Promise<void> {
  const open = Buffer.from(
    '--x\r\nContent-Disposition: form-data; name="files"; filename="sheet.stl"\r\n\r\n',
  )
  const close = Buffer.from('\r\n--x--\r\n')
  return new Promise((resolve, reject) => {
    const sending = request(
      {
        host: '127.0.0.1',
        port: server.port,
        method: 'POST',
        path: '/api/files',
        headers: {
          cookie: server.person.cookie,
          'content-type': 'multipart/form-data; boundary=x',
          'content-length': open.length + 84 + FACETS * 50 + close.length,
        },
      },
      (answer) => {
        answer.resume()
        answer.on('end', () =>
          answer.statusCode === 200
            ? resolve()
            : reject(new Error(`The upload was answered ${answer.statusCode}`)),
        )
      },
    )
    sending.on('error', reject)
    const head = Buffer.alloc(84)
    head.writeUInt32LE(FACETS, 80)
    sending.write(open)
    sending.write(head)
    void sendFacets((part) => new Promise<void>((taken) => sending.write(part, () => taken()))).then(() =>
      sending.end(close),
    )
  })
}

async function sendFacets(send: (part: Buffer) => Promise<void>): Promise<void> {
  const side = Math.sqrt(FACETS / 2)
  const height = (x: number, y: number): number => Math.sin(x / 40) * Math.cos(y / 40) * 10
  for (let y = 0; y < side; y += 1) {
    const part = Buffer.alloc(side * 100)
    for (let x = 0; x < side; x += 1) {
      const corners = [
        [x, y],
        [x + 1, y],
        [x, y + 1],
        [x + 1, y],
        [x + 1, y + 1],
        [x, y + 1],
      ] as const
      corners.forEach(([cornerX, cornerY], corner) => {
        const at = x * 100 + (corner < 3 ? 12 : 26) + corner * 12
        part.writeFloatLE(cornerX, at)
        part.writeFloatLE(cornerY, at + 4)
        part.writeFloatLE(height(cornerX, cornerY), at + 8)
      })
    }
    await send(part)
  }
}
