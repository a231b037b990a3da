import { mkdtempSync, readFileSync, readdirSync, rmSync } from 'node:fs'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { SMTPServer } from 'smtp-server'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'

Object.assign(process.env, {
  DATABASE_URL: 'postgres://nobody@127.0.0.1:1/none',
  DATABASE_AUTH_URL: 'postgres://nobody@127.0.0.1:1/none',
  SESSION_SECRET: 'x'.repeat(32),
  PUBLIC_ORIGIN: 'https://terraces.example',
  MAIL_FROM: 'office@terraces.example',
})
const { keptPost, listKeptMail, smtpPost } = await import('#app/server/outside/mail.server.ts')

const letter = { key: 'letter-1', to: 'guest@example.org', subject: 'A warm terrace', text: 'Größe: 13,20 m\n' }

describe('the post over SMTP', () => {
  const received: { from: string; to: string[]; text: string }[] = []
  let server: SMTPServer
  let url: string
  beforeAll(async () => {
    server = new SMTPServer({
      authOptional: true,
      disabledCommands: ['STARTTLS'],
      onData: (stream, session, done) => {
        let text = ''
        stream.on('data', (part) => (text += part))
        stream.on('end', () => {
          const { mailFrom, rcptTo } = session.envelope
          received.push({ from: mailFrom ? mailFrom.address : '', to: rcptTo.map(({ address }) => address), text })
          done()
        })
      },
    })
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
    const { port } = server.server.address() as AddressInfo
    url = `smtp://127.0.0.1:${port}/?ignoreTLS=true`
  })
  afterAll(() => new Promise<void>((resolve) => server.close(() => resolve())))

  it('hands over the letter, from the address of the configuration', async () => {
    await smtpPost(url).deliver(letter)
    expect(received).toMatchObject([{ from: 'office@terraces.example', to: ['guest@example.org'] }])
    expect(received[0]!.text).toContain('Subject: A warm terrace')
    expect(received[0]!.text).toContain('Message-ID: <letter-1@terraces.example>')
  })

  it.each([
    ['a second address', { to: 'guest@example.org, evil@example.org' }],
    ['a header in the address', { to: 'guest@example.org\r\nBcc: evil@example.org' }],
    ['a header in the subject', { subject: 'Hello\r\nBcc: evil@example.org' }],
    ['no key', { key: '' }],
    ['a way out of the folder as key', { key: '../../etc/passwd' }],
  ])('refuses %s', async (_, wrong) => {
    await expect(smtpPost(url).deliver({ ...letter, ...wrong })).rejects.toThrow()
    expect(received).toHaveLength(1)
  })

  it('fails when nobody takes the letter, so that it is tried again', async () => {
    await expect(smtpPost('smtp://127.0.0.1:1/').deliver(letter)).rejects.toThrow()
  })
})

describe('the post that keeps its letters', () => {
  const folder = mkdtempSync(path.join(tmpdir(), 'inglefield-mail-'))
  afterAll(() => rmSync(folder, { recursive: true }))

  it('writes the whole message and shows it, the same key once', async () => {
    const post = keptPost(folder)
    await post.deliver(letter)
    await post.deliver(letter)
    expect(readdirSync(folder).toSorted()).toEqual(['letter-1.eml', 'letter-1.json'])
    expect(readFileSync(path.join(folder, 'letter-1.eml'), 'utf8')).toContain('To: guest@example.org')
    expect(await listKeptMail(folder)).toMatchObject([letter])
  })

  it('has no letters where there is no folder', async () => {
    expect(await listKeptMail(path.join(folder, 'none'))).toEqual([])
  })
})
