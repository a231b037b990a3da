import { reactRouter } from '@react-router/dev/vite'
import tailwindcss from '@tailwindcss/vite'
import { defineConfig } from 'vite'

export default defineConfig({
  plugins: [tailwindcss(), reactRouter()],
  worker: { format: 'es' },
  optimizeDeps: {
    include: [
      'react',
      'react-dom',
      'react-dom/client',
      'react-router',
      'react-router/dom',
      'swr',
      'comlink',
      'd3-contour',
      'd3-scale',
      'd3-scale-chromatic',
      'zod',
    ],
    exclude: ['pg', 'drizzle-orm', 'better-auth'],
  },
  server: { watch: { ignored: ['**/.data/**', '**/test-results/**', '**/build/**', '**/playwright-report/**'] } },
})
