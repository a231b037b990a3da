import { existsSync } from 'node:fs'
import path from 'node:path'
import { fileURLToPath } from 'node:url'

// Imported before anything that reads the environment: rows of a file `.env` count where the environment has none.
const file = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../.env')
if (existsSync(file)) process.loadEnvFile(file)
