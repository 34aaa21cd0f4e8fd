import { defineConfig } from "vite";

/** The page is served by our own server from the same origin; nothing is fetched from elsewhere. */
export default defineConfig({
  root: import.meta.dirname,
  base: "/",
  build: { outDir: "../.build/client", emptyOutDir: true, target: "es2022", modulePreload: { polyfill: false } },
  oxc: { jsx: { runtime: "automatic", importSource: "preact" } },
  server: { proxy: { "/api": "http://127.0.0.1:7317" } },
});
