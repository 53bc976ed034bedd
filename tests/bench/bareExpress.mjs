/** The peer: Express with one handler that sends a string. */
import express from 'express'

process.once('message', (html) => {
  const app = express()
  app.get('/', (_req, res) => res.send(html))
  const server = app.listen(0, () => process.send(server.address().port))
})
