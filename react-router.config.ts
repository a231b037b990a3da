import type { Config } from '@react-router/dev/config'

export default {
  ssr: true,
  // Behind a proxy the framework does not know its own origin: app/server/origin.server.ts checks every request.
  allowedActionOrigins: ['**'],
  future: {
    v8_middleware: true,
    v8_splitRouteModules: true,
    v8_viteEnvironmentApi: true,
    v8_passThroughRequests: true,
    v8_trailingSlashAwareDataRequests: true,
  },
} satisfies Config
