import { connect } from 'node:net'

const CONNECTIONS = 8

/** Requests a second that a server answers in full, over a few kept connections, each asking again when its answer is whole. */
export async function askOften(port: number, path: string, forMs: number): Promise<number> {
  const end = Date.now() + forMs
  const counts = await Promise.all(Array.from({ length: CONNECTIONS }, () => askUntil(port, path, end)))
  return counts.reduce((sum, count) => sum + count, 0) / (forMs / 1000)
}

function askUntil(port: number, path: string, end: number): Promise<number> {
  const request = `GET ${path} HTTP/1.1\r\nHost: localhost:${port}\r\nAccept-Language: en\r\n\r\n`
  return new Promise((resolve, reject) => {
    let count = 0
    let left = -1
    let head = ''
    const socket = connect({ port, host: '127.0.0.1', noDelay: true }, () => socket.write(request))
    socket.on('error', reject)
    socket.on('data', (chunk: Buffer) => {
      if (left < 0) {
        head += chunk.toString('latin1')
        const at = head.indexOf('\r\n\r\n')
        if (at < 0) return
        const length = /^HTTP\/1\.1 200[^]*?content-length: (\d+)/i.exec(head)?.[1]
        if (length === undefined) return reject(new Error(`${path} answered ${head.slice(0, 200)}`))
        left = Number(length) - (head.length - at - 4)
        head = ''
      } else left -= chunk.length
      if (left > 0) return
      left = -1
      count += 1
      if (Date.now() < end) socket.write(request)
      else socket.end(() => resolve(count))
    })
  })
}
