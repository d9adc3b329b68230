import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig, type Plugin } from 'vite';
import { VitePWA } from 'vite-plugin-pwa';

const hubUrl = process.env['STEEPFALL_HUB_URL'] ?? 'http://127.0.0.1:4680';

/** The font is the first thing a person sees move: asked for before the style sheet is read. */
function preloadFont(): Plugin {
  return {
    name: 'steepfall-preload-font',
    transformIndexHtml: {
      order: 'post',
      handler: (_html, { bundle }) =>
        Object.keys(bundle ?? {})
          .filter((name) => name.endsWith('.woff2'))
          .map((name) => ({
            tag: 'link',
            attrs: { rel: 'preload', as: 'font', type: 'font/woff2', crossorigin: '', href: `/${name}` },
            injectTo: 'head',
          })),
    },
  };
}

export default defineConfig({
  plugins: [
    react(),
    tailwindcss(),
    preloadFont(),
    VitePWA({
      registerType: 'prompt',
      injectRegister: false,
      manifest: {
        id: '/',
        name: 'Steepfall',
        short_name: 'Steepfall',
        description: 'A run sheet for people who make sparkling hop tea by the keg.',
        lang: 'en',
        start_url: '/',
        scope: '/',
        display: 'standalone',
        orientation: 'any',
        background_color: '#12201C',
        theme_color: '#12201C',
        icons: [
          { src: '/icons/mark.svg', sizes: 'any', type: 'image/svg+xml', purpose: 'any' },
          { src: '/icons/mark-192.png', sizes: '192x192', type: 'image/png', purpose: 'any' },
          { src: '/icons/mark-512.png', sizes: '512x512', type: 'image/png', purpose: 'any' },
          { src: '/icons/mark-maskable-512.png', sizes: '512x512', type: 'image/png', purpose: 'maskable' },
        ],
      },
      workbox: {
        // Without it the first tab stays uncontrolled, and offline it loses its sounds and its lazy routes.
        clientsClaim: true,
        // Answers pushes; the browser keeps it with the worker that it belongs to.
        importScripts: ['/push-worker.js'],
        globIgnores: ['push-worker.js', 'trust/**'],
        globPatterns: ['**/*.{js,css,html,woff2,mp3,ogg,wav,svg,png}'],
        navigateFallback: '/index.html',
        navigateFallbackDenylist: [/^\/api/, /^\/socket\.io/, /^\/export/],
      },
    }),
  ],
  server: {
    port: 4681,
    strictPort: true,
    proxy: { '/api': hubUrl, '/socket.io': { target: hubUrl, ws: true } },
  },
  preview: { port: 4682, proxy: { '/api': hubUrl, '/socket.io': { target: hubUrl, ws: true } } },
});
