import node from '@astrojs/node';
import react from '@astrojs/react';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig } from 'astro/config';

/** The development server opens the same site and stream as the production entry does. */
const siteInDevelopment = {
  name: 'site-in-development',
  hooks: {
    'astro:server:setup': async ({ server }) => {
      const { openDevelopmentSite } = await server.ssrLoadModule('/src/server/development-site.ts');
      await openDevelopmentSite(server.httpServer);
    },
  },
};

export default defineConfig({
  output: 'server',
  adapter: node({ mode: 'middleware' }),
  integrations: [react(), siteInDevelopment],
  devToolbar: { enabled: false },
  // nothing of ours is kept in Astro's own sessions; in memory they leave no folder behind
  session: { driver: 'memory' },
  security: {
    // src/middleware.ts checks the origin, against PUBLIC_URL, on every unsafe request and not on forms alone
    checkOrigin: false,
    // src/server/named-request.ts writes the one real host into every request before Astro sees it; the host is
    // known only where the build runs, and an empty list here would make Astro call this site 'localhost'
    allowedDomains: [{}],
  },
  build: { inlineStylesheets: 'never' },
  // collects the hashes of the islands' inline starters; src/server/security-headers.ts writes the policy
  experimental: { csp: true },
  vite: {
    plugins: [tailwindcss()],
    build: { assetsInlineLimit: 0 },
    // the local database and logs change all the time, and each change would reload every page
    server: { watch: { ignored: ['**/.tareline/**'] } },
    ssr: { noExternal: ['echarts-for-react', 'echarts', 'zrender'] },
  },
});
