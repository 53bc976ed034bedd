import tailwindcss from '@tailwindcss/vite'
import react from '@vitejs/plugin-react'
import { defineConfig } from 'vitest/config'

/** One build for the browser and one for the server; `vite build --app` makes both. */
export default defineConfig({
  plugins: [react(), tailwindcss()],
  publicDir: false,
  environments: {
    client: {
      build: {
        outDir: 'dist/client',
        manifest: true,
        rollupOptions: {
          input: {
            app: 'src/app/shell.html',
            reader: 'src/reader/reader.ts',
            readingStyle: 'src/styles/reading.css',
            readingFonts: 'src/styles/readingFonts.css',
          },
        },
      },
    },
    ssr: {
      build: {
        outDir: 'dist/server',
        emptyOutDir: true,
        ssr: true,
        target: 'node20',
        sourcemap: true,
        rollupOptions: {
          input: {
            main: 'server/main.ts',
            worker: 'server/workers/worker.ts',
            renderPage: 'src/app/renderPage.tsx',
          },
          output: { entryFileNames: '[name].js' },
        },
      },
    },
  },
  builder: {
    buildApp: async (builder) => {
      await builder.build(builder.environments.client!)
      await builder.build(builder.environments.ssr!)
    },
  },
  test: {
    environment: 'node',
    include: [
      'shared/**/*.test.ts',
      'server/**/*.test.ts',
      'src/**/*.test.{ts,tsx}',
      'tests/{api,reference,faults}/**/*.test.ts',
      'fixtures/**/*.test.ts',
    ],
    testTimeout: 60_000,
  },
})
