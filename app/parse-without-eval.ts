import { config } from 'zod/v4/core'

// The page's content policy allows no eval: parsing must not even ask for it. First import of the root.
config({ jitless: true })
