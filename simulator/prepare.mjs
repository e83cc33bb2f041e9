// Runs before start, dev and test, when nothing may be installed yet: plain Node.js, nothing imported from packages.
import { spawnSync } from 'node:child_process';
import { existsSync, statSync, utimesSync } from 'node:fs';
import { delimiter, dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

const root = dirname(dirname(fileURLToPath(import.meta.url)));
const forTests = process.argv.includes('--tests');

const NEEDED = [
  {
    program: 'mariadbd',
    packages: ['mariadb-server-core', 'mariadb-client-core'],
    what: 'the database server',
  },
  {
    program: 'mariadb-install-db',
    packages: ['mariadb-server-core', 'mariadb-client-core'],
    what: 'the database server',
  },
];
const NEEDED_FOR_TESTS = [
  { program: 'chromium', packages: ['chromium'], what: 'the browser for the tests' },
  { program: 'mosquitto', packages: ['mosquitto'], what: 'the second broker for the tests' },
  {
    program: 'mosquitto_pub',
    packages: ['mosquitto-clients'],
    what: 'the independent MQTT client for the tests',
  },
];

checkNode();
installDebianPackages(forTests ? [...NEEDED, ...NEEDED_FOR_TESTS] : NEEDED);
installNodePackages();

function checkNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if (major > 20 || (major === 20 && minor >= 19)) return;
  stop(`Tareline needs Node.js 20.19 or newer; this is ${process.versions.node}.`);
}

function installDebianPackages(needed) {
  const missing = needed.filter(({ program }) => !isInstalled(program));
  if (missing.length === 0) return;
  const packages = [...new Set(missing.flatMap((each) => each.packages))];
  const what = [...new Set(missing.map((each) => each.what))].join(', ');
  const asRoot = rootPrefix();
  if (asRoot === undefined || !isInstalled('apt-get'))
    stop(`Missing: ${what}. Install ${packages.join(' ')} (Debian's package names), then start again.`);
  say(`Installing ${packages.join(' ')} from Debian's packages (${what}).`);
  run([...asRoot, 'apt-get', 'update', '-qq']);
  run([
    ...asRoot,
    'env',
    'DEBIAN_FRONTEND=noninteractive',
    'apt-get',
    'install',
    '-y',
    '-qq',
    '--no-install-recommends',
    ...packages,
  ]);
}

function installNodePackages() {
  const lock = join(root, 'package-lock.json');
  const installed = join(root, 'node_modules', '.package-lock.json');
  if (existsSync(installed) && statSync(installed).mtimeMs >= statSync(lock).mtimeMs) return;
  say('Installing the Node.js packages of package-lock.json.');
  const npm = process.env.npm_execpath === undefined ? ['npm'] : [process.execPath, process.env.npm_execpath];
  run([...npm, 'ci', '--include=dev', '--no-audit', '--no-fund']);
  const now = new Date();
  utimesSync(installed, now, now);
}

function isInstalled(program) {
  const folders = [...(process.env.PATH ?? '').split(delimiter), '/usr/sbin', '/usr/bin', '/usr/local/sbin'];
  return folders.some((folder) => folder !== '' && existsSync(join(folder, program)));
}

/** What to put before a command that needs root, or undefined when this user cannot have it without a question. */
function rootPrefix() {
  if (process.getuid?.() === 0) return [];
  return spawnSync('sudo', ['-n', 'true'], { stdio: 'ignore' }).status === 0 ? ['sudo', '-n'] : undefined;
}

function run([program, ...rest]) {
  const { status, error } = spawnSync(program, rest, { cwd: root, stdio: ['ignore', 'inherit', 'inherit'] });
  if (error !== undefined || status !== 0)
    stop(
      `“${[program, ...rest].join(' ')}” failed${error === undefined ? '' : `: ${error.message}`}. Its own words are above.`,
    );
}

function say(line) {
  console.log(line);
}

function stop(line) {
  console.error(line);
  process.exit(1);
}
