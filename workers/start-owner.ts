import '#workers/start-configuration.ts'
import { createInterface } from 'node:readline/promises'
import { Writable } from 'node:stream'
import { z } from 'zod'
import { passwordLimits } from '#app/server/password-limits.server.ts'
import { StartProblem } from '#drizzle/postgres-binaries.ts'
import { addOwner } from '#drizzle/seed/accounts.ts'
import { addCatalogue } from '#drizzle/seed/seed.ts'
import { prepareDatabase } from '#workers/start-database.ts'

// Makes an organisation and its owner where there is no demonstration: nobody can sign up.

const usage = 'npm run owner -- "Terrace Heating Ltd" "Maren Osier" maren@example.org'
const askedSchema = z.tuple([
  z.string().trim().min(1).max(120),
  z.string().trim().min(1).max(120),
  z.email().max(254).toLowerCase(),
])

/** The first line of the input, not shown while it is typed. */
async function readPassword(): Promise<string> {
  const { least, most } = passwordLimits
  if (process.stdin.isTTY) process.stdout.write(`Password, ${least} to ${most} characters: `)
  const unseen = new Writable({ write: (_chunk, _encoding, done) => done() })
  const input = createInterface({ input: process.stdin, output: unseen, terminal: process.stdin.isTTY })
  const { value = '' } = await input[Symbol.asyncIterator]().next()
  input.close()
  if (value.length < least || value.length > most)
    throw new StartProblem(`The password has ${least} to ${most} characters.`)
  return value
}

async function makeOwner(): Promise<void> {
  const asked = askedSchema.safeParse(process.argv.slice(2))
  if (!asked.success) throw new StartProblem(`Say the organisation, the owner's name and address:\n${usage}`)
  const [organisation, name, email] = asked.data
  const password = await readPassword()
  const database = await prepareDatabase({ demo: false })
  try {
    const author = await addOwner(database.urls.auth, organisation, { name, email, password })
    if (!author) throw new StartProblem(`${organisation} or ${email} is there already.`)
    await addCatalogue(database.urls.app, author)
    console.log(`${email} is the owner of ${organisation}, with the invented catalogue of the demonstration.`)
  } finally {
    await database.release()
  }
}

try {
  await makeOwner()
} catch (problem) {
  console.error(problem instanceof StartProblem ? `\n${problem.message}\n` : problem)
  process.exitCode = 1
}
