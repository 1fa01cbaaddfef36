import { spawn } from 'node:child_process';

/** A child that is started again when it dies, ever more slowly, until it is stopped on purpose. */
export class KeptChild {
  #child;
  #stopping = false;
  #pauseMs = 200;

  constructor(name, command, args, options, onSpawn = () => undefined) {
    this.name = name;
    this.start = () => {
      this.#child = spawn(command, args, { ...options, stdio: ['ignore', 'pipe', 'pipe'] });
      const since = Date.now();
      onSpawn(this.#child);
      this.#child.once('exit', (code) => {
        if (this.#stopping) return;
        // One that ran for a while starts afresh at once; one that dies at once waits longer each time.
        this.#pauseMs = Date.now() - since > 10_000 ? 200 : Math.min(this.#pauseMs * 2, 10_000);
        console.error(`The ${name} ended (${code ?? 'by a signal'}); starting it again.`);
        setTimeout(() => this.#stopping || this.start(), this.#pauseMs);
      });
    };
  }

  get pid() {
    return this.#child?.pid;
  }

  async stop() {
    this.#stopping = true;
    const child = this.#child;
    if (!child || child.exitCode !== null || child.signalCode !== null) return;
    const ended = new Promise((resolve) => child.once('exit', resolve));
    child.kill('SIGTERM');
    const last = setTimeout(() => child.kill('SIGKILL'), 10_000);
    await ended;
    clearTimeout(last);
  }
}
