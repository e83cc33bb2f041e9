import { defineConfig } from 'vitest/config';

// a zone with daylight saving, so that whatever forgets it fails
process.env['TZ'] = 'Europe/Berlin';

export default defineConfig({
  test: {
    include: ['tests/**/*.test.{ts,tsx}'],
    globalSetup: ['tests/database-server.ts'],
    reporters: ['default', './tests/closing-line.ts'],
    // two cores: the database and the brokers need theirs as well
    maxWorkers: 2,
    testTimeout: 20_000,
    hookTimeout: 60_000,
  },
});
