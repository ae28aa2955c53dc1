import react from '@vitejs/plugin-react'
import type { Plugin } from 'vite'
import { defineConfig } from 'vitest/config'

/**
 * The development server puts inline scripts and styles into the page, which the page's own policy
 * forbids. It therefore leaves the policy out; what is built keeps it.
 */
const withoutPolicyWhileDeveloping: Plugin = {
  name: 'without-policy-while-developing',
  apply: 'serve',
  transformIndexHtml: (html) =>
    html.replace(/<meta\s+http-equiv="Content-Security-Policy"[^>]*>/, ''),
}

export default defineConfig({
  // Relative addresses, so that the built folder works wherever it is put.
  base: './',
  plugins: [react(), withoutPolicyWhileDeveloping],
  build: {
    target: 'es2022',
    modulePreload: { polyfill: false },
    // Inlined fonts would be refused by the page's policy.
    assetsInlineLimit: 0,
    rolldownOptions: {
      output: {
        // Every script the page loads at its start is called start-*, and no other is: the size check
        // counts by that name.
        entryFileNames: 'assets/start-[hash].js',
        chunkFileNames: 'assets/[name]-[hash].js',
        codeSplitting: { groups: [{ name: 'start', tags: ['$initial'] }] },
      },
    },
  },
  test: {
    include: ['tests/**/*.test.{ts,tsx}'],
    // Properties try many cases; on a busy machine that takes its time.
    testTimeout: 60_000,
    coverage: { provider: 'v8', include: ['src/**'], reportsDirectory: '.reports/coverage' },
  },
})
