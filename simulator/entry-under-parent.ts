import { pathToFileURL } from 'node:url';

/**
 * Runs a production entry as a child of the site: it ends when the site's own process is gone, however that went.
 * The entry itself knows nothing of it.
 */
process.on('disconnect', () => process.kill(process.pid, 'SIGTERM'));
const entry = process.argv[2];
if (entry === undefined) throw new Error('Start this with the entry to run.');
await import(pathToFileURL(entry).href);
