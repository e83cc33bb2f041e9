import { makeFirstAdmin } from './first-admin';
import { adminArguments, runPersonCommand } from './person-command';

process.exitCode = await runPersonCommand({
  usage: 'Usage: npm run first-admin -- --email you@example.org --name "Your Name"',
  arguments: adminArguments,
  announcement: ({ name, email }) =>
    `${name} (${email}) is the admin. This link, good once and for 24 hours, sets the password:`,
  make: makeFirstAdmin,
});
