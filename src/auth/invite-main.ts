import { invite } from './invitation';
import { inviteArguments, runPersonCommand } from './person-command';

process.exitCode = await runPersonCommand({
  usage: 'Usage: npm run invite -- --role operator --email them@example.org --name "Their Name"',
  arguments: inviteArguments,
  announcement: ({ name, email, role }) =>
    `${name} (${email}) is invited as ${role}. This link, good once and for 24 hours, sets the password:`,
  make: invite,
});
