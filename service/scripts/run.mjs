import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { ROOT } from './paths.mjs';

/** Runs an installed command in the project's folder; answers its exit status. Output goes where ours goes. */
export function run(name, args, options = {}) {
  const command = join(ROOT, 'node_modules', '.bin', process.platform === 'win32' ? `${name}.cmd` : name);
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, { cwd: ROOT, stdio: 'inherit', ...options });
    const pass = (signal) => child.kill(signal);
    for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, pass);
    child.on('error', reject);
    child.on('close', (code) => {
      for (const signal of ['SIGINT', 'SIGTERM']) process.off(signal, pass);
      resolve(code ?? 1);
    });
  });
}

const STEPS = {
  lint: () => run('eslint', ['--max-warnings', '0', '.']),
  format: () => run('prettier', ['--check', '--log-level', 'warn', '.']),
  types: async () => {
    let failed = 0;
    for (const workspace of ['shared', 'schema', 'service', 'app', 'tests']) {
      if ((await run('tsc', ['-p', workspace])) !== 0) failed = 1;
    }
    return failed;
  },
};

/** Runs the named steps to the end, also after one fails; answers those that failed. */
export async function steps(names) {
  const failed = [];
  for (const name of names) {
    console.log(`\n--- ${name}`);
    if ((await STEPS[name]()) !== 0) failed.push(name);
  }
  return failed;
}
