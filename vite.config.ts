import { fileURLToPath } from 'node:url'
import vue from '@vitejs/plugin-vue'
import vuetify from 'vite-plugin-vuetify'
import { defineConfig } from 'vitest/config'

const at = (path: string) => fileURLToPath(new URL(path, import.meta.url))

/** Chunks are named by what they hold, so that the map route alone pays for Leaflet and a chart route for ECharts. */
const groups = [
  // With its setting in one chunk: a contract that is made before the setting would try `new Function`, which the page's
  // content policy forbids.
  { name: 'zod', test: /node_modules[\\/]zod[\\/]|src[\\/]plugins[\\/]zod\.ts/ },
  { name: 'vue', test: /node_modules[\\/](@vue|vue|vue-router|pinia|@pinia)[\\/]|vite[\\/]preload-helper/ },
  { name: 'echarts', test: /node_modules[\\/](echarts|zrender|vue-echarts)[\\/]/ },
  { name: 'leaflet', test: /node_modules[\\/](leaflet|@vue-leaflet)[\\/]/ },
]

export default defineConfig({
  plugins: [vue(), vuetify({ autoImport: true })],
  // vue-leaflet imports the ES build; a second copy of Leaflet would break its instanceof checks.
  resolve: { alias: [{ find: /^leaflet$/, replacement: 'leaflet/dist/leaflet-src.esm.js' }] },
  publicDir: 'src/public',
  build: {
    outDir: 'dist',
    chunkSizeWarningLimit: 700,
    rolldownOptions: { output: { codeSplitting: { groups } } },
  },
  optimizeDeps: { exclude: ['vuetify'] },
  server: {
    port: Number(process.env.VITE_PORT ?? 5173),
    proxy: Object.fromEntries(
      ['/api', '/tiles', '/ogc'].map((path) => [path, process.env.API_ORIGIN ?? 'http://127.0.0.1:8080']),
    ),
  },
  test: {
    // Vitest leaves one core to the terminal; a test run has them all.
    maxWorkers: 2,
    projects: [
      {
        extends: true,
        test: {
          name: 'shared',
          include: ['tests/shared/**/*.test.ts', 'tests/*.test.ts'],
          environment: 'node',
          // Pure code keeps nothing between files, so that loading it once a worker is enough.
          isolate: false,
        },
      },
      {
        extends: true,
        test: {
          name: 'server',
          include: ['tests/server/**/*.test.ts'],
          environment: 'node',
          // Each file has its own database, application and folder; loading the server anew would take longer than its tests.
          isolate: false,
          globalSetup: [at('tests/support/database.global.ts')],
          testTimeout: 30_000,
          hookTimeout: 60_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'src',
          include: ['tests/src/**/*.test.ts'],
          environment: 'happy-dom',
          // Loading Vuetify anew for each file takes longer than the tests; the setup file clears the page instead.
          isolate: false,
          setupFiles: [at('tests/src/support/setup.ts')],
          server: { deps: { inline: ['vuetify'] } },
        },
      },
    ],
  },
})
