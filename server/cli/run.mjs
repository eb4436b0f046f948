/**
 * The one program behind `npm start`, `npm test`, `npm run soak` and `npm run muslin`. Plain JavaScript that needs nothing but
 * Node: it must run before any package is there. It checks Node, installs packages if they are missing or old, sees to it
 * that everything stops once when it is asked to, and hands over to the command written in TypeScript.
 */
import { spawn } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

const COULD_NOT_RUN = 3;
const OLDEST_NODE = [20, 19];
const PARENT_LOOK_MS = 500;
/** A command that has not stopped by then is ended hard, so that nobody has to kill it. */
const STOP_LIMIT_MS = 90_000;
const SIGNALS = { SIGINT: 2, SIGTERM: 15, SIGHUP: 1 };
/** `build` is started by the others. */
const COMMANDS = ['start', 'test', 'soak', 'muslin', 'worker', 'build'];

const rootDir = path.dirname(path.dirname(path.dirname(fileURLToPath(import.meta.url))));
const [commandName = '', ...args] = process.argv.slice(2);

/** @param {string} words */
function say(words) {
  process.stderr.write(`${words}\n`);
}

function nodeIsOld() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number);
  const [oldestMajor = 0, oldestMinor = 0] = OLDEST_NODE;
  return major < oldestMajor || (major === oldestMajor && minor < oldestMinor);
}

/**
 * Whether every package of package-lock.json is there in its version. Compared by content, not by the times of the files: a
 * clone or a pull makes those say anything. Optional packages are for other machines; a production install has none of the dev ones.
 * @param {{ withDev: boolean }} options
 */
function packagesAreThere({ withDev }) {
  const record = path.join(rootDir, 'node_modules', '.package-lock.json');
  if (!existsSync(record)) return false;
  try {
    const wanted = JSON.parse(readFileSync(path.join(rootDir, 'package-lock.json'), 'utf8')).packages;
    const found = JSON.parse(readFileSync(record, 'utf8')).packages;
    return Object.keys(wanted).every((name) => {
      const entry = wanted[name];
      if (name === '' || entry.optional || entry.devOptional || (entry.dev && !withDev)) return true;
      return found[name]?.version === entry.version;
    });
  } catch {
    return false;
  }
}

/**
 * Runs `npm ci`; resolves to null or to what went wrong. In a process group of its own, which is ended whole when we stop.
 * @param {AbortSignal} signal
 * @returns {Promise<string | null>}
 */
function installPackages(signal) {
  const npm = process.env.npm_execpath;
  const [program, first] = npm?.endsWith('.js') ? [process.execPath, [npm]] : ['npm', []];
  const quiet = ['ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error'];
  return new Promise((resolve) => {
    const child = spawn(program, [...first, ...quiet], {
      cwd: rootDir,
      detached: true,
      stdio: ['ignore', 'pipe', 'pipe'],
    });
    let said = '';
    const keep = (/** @type {Buffer} */ chunk) => {
      said += chunk.toString('utf8');
    };
    child.stdout.on('data', keep);
    child.stderr.on('data', keep);
    const end = () => child.pid && process.kill(-child.pid, 'SIGTERM');
    signal.addEventListener('abort', end, { once: true });
    child.once('error', (error) => resolve(`npm could not be started: ${error.message}`));
    child.once('close', (code) => {
      signal.removeEventListener('abort', end);
      resolve(code === 0 ? null : said.trim());
    });
  });
}

/** Aborted by the first signal, or when the parent is gone: npm 11 ends at once on SIGTERM and passes nothing on. */
function watchForStop() {
  const controller = new AbortController();
  const parent = process.ppid;
  const stop = (/** @type {string} */ reason) => {
    if (controller.signal.aborted) return;
    controller.abort(reason);
    setTimeout(() => {
      say(`Not stopped after ${STOP_LIMIT_MS / 1000} seconds; ending now.`);
      process.exit(COULD_NOT_RUN);
    }, STOP_LIMIT_MS).unref();
  };
  for (const name of Object.keys(SIGNALS)) process.on(name, () => stop(name));
  process.on('uncaughtException', (error) => {
    say(error.stack ?? String(error));
    stop('fault');
  });
  setInterval(() => process.ppid !== parent && stop('SIGHUP'), PARENT_LOOK_MS).unref();
  return controller.signal;
}

/**
 * Where the caller stands: npm moves to the repository before it starts us and tells where it was called. Its word counts
 * only for this very script; a shell started by another one still carries it.
 */
function callerDir() {
  const throughNpm = process.env.npm_lifecycle_event === commandName && process.cwd() === rootDir;
  return (throughNpm && process.env.INIT_CWD) || process.cwd();
}

// Whoever read our words may be gone, a closed terminal for one: that must not keep us from stopping in order.
for (const stream of [process.stdout, process.stderr]) stream.on('error', () => undefined);

/** @returns {Promise<number>} the exit code */
async function main() {
  if (nodeIsOld()) {
    say(
      `Muslin needs Node.js ${OLDEST_NODE.join('.')} or later; this is ${process.versions.node}. Install a newer one and try again.`,
    );
    return COULD_NOT_RUN;
  }
  if (!COMMANDS.includes(commandName)) {
    say('Use: npm start, npm test, npm run soak, or npm run -s muslin -- COMMAND.');
    return 2;
  }
  const signal = watchForStop();
  const stopped = () => {
    const number = SIGNALS[/** @type {keyof SIGNALS} */ (signal.reason)];
    return number === undefined ? COULD_NOT_RUN : 128 + number;
  };
  const withDev = commandName === 'test' || commandName === 'soak';
  if (!packagesAreThere({ withDev })) {
    say('Installing packages (npm ci): about half a minute.');
    const fault = await installPackages(signal);
    if (signal.aborted) return stopped();
    if (fault !== null) {
      say(`Packages could not be installed:\n${fault}`);
      return COULD_NOT_RUN;
    }
  }
  const { register } = await import('tsx/esm/api');
  register();
  const command = await import(`./${commandName}.ts`);
  const code = await command.run({ rootDir, callerDir: callerDir(), args, signal });
  return signal.aborted && (code !== 0 || signal.reason === 'fault') ? stopped() : code;
}

try {
  process.exit(await main());
} catch (error) {
  const foreseen = error instanceof Error && error.name === 'CouldNotRun';
  say(foreseen ? error.message : error instanceof Error ? (error.stack ?? error.message) : String(error));
  process.exit(COULD_NOT_RUN);
}
