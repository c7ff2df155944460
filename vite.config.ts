import { readFileSync } from 'node:fs';
import react from '@vitejs/plugin-react';
import type { Plugin } from 'vite';
import { VitePWA } from 'vite-plugin-pwa';
import { defineConfig } from 'vitest/config';

const { version } = JSON.parse(readFileSync(new URL('./package.json', import.meta.url), 'utf8'));

/** Live reload puts a script into the page, which the page's own policy forbids: the policy holds for what is built. */
const withoutPolicyWhileDeveloping: Plugin = {
  name: 'without-policy-while-developing',
  apply: 'serve',
  transformIndexHtml: (html) => html.replace(/<meta\s+http-equiv="Content-Security-Policy"[^>]*>/, ''),
};

/**
 * Everything that the page can ask for is kept at the first visit, so that it starts and solves without a network. A new
 * version waits until it is asked for: src/app/offline.ts.
 */
const offline = VitePWA({
  strategies: 'generateSW',
  registerType: 'prompt',
  injectRegister: false,
  manifest: {
    name: 'Splitwright',
    short_name: 'Splitwright',
    description: 'Draw a process; its material and energy balances follow while you draw.',
    start_url: './',
    scope: './',
    display: 'standalone',
    background_color: '#ffffff',
    theme_color: '#ffffff',
    icons: [{ src: 'icon.svg', sizes: 'any', type: 'image/svg+xml' }],
  },
  workbox: {
    globPatterns: ['**/*.{html,js,css,ttf,json,svg,txt}'],
    maximumFileSizeToCacheInBytes: 8 * 1024 * 1024,
    // From the first visit on, not only after the next load; a new version still waits.
    clientsClaim: true,
    cleanupOutdatedCaches: true,
    inlineWorkboxRuntime: true,
  },
});

export default defineConfig({
  // Relative addresses: the built page works from any folder of any server.
  base: './',
  plugins: [react(), withoutPolicyWhileDeveloping, offline],
  define: { __APP_VERSION__: JSON.stringify(version) },
  worker: { format: 'es' },
  build: { target: 'es2022' },
  test: {
    include: ['tests/**/*.test.ts', 'tests/**/*.test.tsx'],
    exclude: ['node_modules/**', 'dist/**', 'e2e/**'],
    testTimeout: 20_000,
  },
});
