import { mkdirSync } from 'node:fs'
import { open, rename } from 'node:fs/promises'
import path from 'node:path'
import { createTransport, type SendMailOptions } from 'nodemailer'
import type { Config } from '../config'

/** How a mail leaves: to a mail server, or into a file of the data folder where none is set. */
export interface MailTransport {
  /** Resolves when the mail was accepted. `fileName` is constant per mail, so that a repeat replaces its file. */
  send: (mail: SendMailOptions, fileName: string) => Promise<void>
}

/** A mail server that says nothing for so long is as good as down: the mail is tried again later. */
const PATIENCE_MS = 20_000

export function mailTransport(config: Config): MailTransport {
  return config.smtpUrl === undefined
    ? folderTransport(path.join(config.dataDir, 'mail'))
    : smtpTransport(config.smtpUrl)
}

function smtpTransport(smtpUrl: string): MailTransport {
  const transport = createTransport({
    url: smtpUrl,
    connectionTimeout: PATIENCE_MS,
    greetingTimeout: PATIENCE_MS,
    socketTimeout: PATIENCE_MS,
  })
  return {
    send: async (mail) => {
      await transport.sendMail(mail)
    },
  }
}

function folderTransport(folder: string): MailTransport {
  const transport = createTransport({ streamTransport: true, buffer: true, newline: 'unix' })
  return {
    send: async (mail, fileName) => {
      mkdirSync(folder, { recursive: true })
      const { message } = await transport.sendMail(mail)
      const file = path.join(folder, fileName)
      const part = `${file}.part`
      const handle = await open(part, 'w')
      try {
        await handle.writeFile(message as Buffer)
        await handle.sync()
      } finally {
        await handle.close()
      }
      await rename(part, file)
    },
  }
}
