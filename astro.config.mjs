import node from '@astrojs/node';
import react from '@astrojs/react';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig } from 'astro/config';
import auth from 'auth-astro';

export default defineConfig({
  output: 'server',
  adapter: node({ mode: 'standalone' }),
  integrations: [react(), auth({ configFile: './src/server/auth.config' })],
  // Astro believes no Host by default and builds every URL from localhost. All hosts pass here; the middleware compares
  // each with PUBLIC_ORIGIN, which is known only when the server starts, and checks the Origin of writes itself, since
  // Astro's own check would refuse form uploads by access token, which carry no Origin.
  security: { checkOrigin: false, allowedDomains: [{}] },
  experimental: {
    csp: {
      directives: [
        "default-src 'self'",
        "img-src 'self' data: blob:",
        "font-src 'self'",
        "connect-src 'self'",
        "object-src 'none'",
        "base-uri 'none'",
        "form-action 'self'",
        "worker-src 'self' blob:",
      ],
    },
  },
  devToolbar: { enabled: false },
  telemetry: false,
  vite: {
    plugins: [tailwindcss()],
    // Several checkouts or servers may share one node_modules while working; each may bring its own cache.
    ...(process.env.ZAFFRE_VITE_CACHE ? { cacheDir: process.env.ZAFFRE_VITE_CACHE } : {}),
    ssr: { external: ['@libsql/client', '@node-rs/argon2'] },
  },
});
