/** The program as `npm run serve` starts it, in a process of its own that a test may kill. */
import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { join, resolve } from 'node:path';
import { createInterface } from 'node:readline';

export interface OwnProcess {
  readonly child: ChildProcess;
  readonly address: string;
}

const children: ChildProcess[] = [];

/** @param folder holds its sites and what it keeps for itself */
export async function serve(folder: string): Promise<OwnProcess> {
  const program = resolve(import.meta.dirname, '../../dist/main/serve.js');
  const child = spawn(process.execPath, [program, '--port', '0', '--sites', join(folder, 'sites'), '--quiet'], {
    env: { ...process.env, TALLYBEAM_FOLDER: join(folder, 'own') },
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  children.push(child);
  const [address] = (await once(createInterface({ input: child.stdout }), 'line')) as [string];
  return { child, address };
}

/** Without a chance to write anything more. */
export async function kill(child: ChildProcess): Promise<void> {
  const gone = once(child, 'exit');
  child.kill('SIGKILL');
  await gone;
}

export function killAll(): void {
  for (const child of children.splice(0)) child.kill('SIGKILL');
}
