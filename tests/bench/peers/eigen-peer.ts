/** Eigen's SimplicialLDLT as a child process that measures itself, round by round. */
import { spawn, spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createInterface } from 'node:readline';
import type { Frame } from '@/lib/model/frame';
import { writeFrames } from './write-frames';

const compiler = 'g++';
const headers = ['/usr/include/eigen3', '/usr/local/include/eigen3', '/opt/homebrew/include/eigen3'];
const source = join(process.env['TALLYFRAME_BENCH'] ?? '.', 'peers', 'eigen-peer.cpp');

const has = (program: string): boolean => spawnSync(program, ['--version'], { stdio: 'ignore' }).status === 0;
const includes = (): string | undefined => headers.find((folder) => existsSync(join(folder, 'Eigen', 'Sparse')));

/** Why Eigen cannot be measured here, and how to get it; null where it can. */
export function eigenMissing(): string | null {
  const missing = [...(has('g++') ? [] : ['g++']), ...(includes() ? [] : ['libeigen3-dev'])];
  return missing.length === 0
    ? null
    : `Eigen is not measured: ${missing.join(' and ')} not found. On Debian or Ubuntu \`npm run bench -- --peers\` installs what is ` +
        'missing through apt (as root, or with sudo); elsewhere: a C++17 compiler called g++, and Eigen 3.3 or later in ' +
        `${headers.join(' or ')}. Keys *.eigen are left out.`;
}

/** `--peers`: installs g++ and libeigen3-dev where missing. */
export function installPeers(): void {
  const wanted = [...(has('g++') ? [] : ['g++']), ...(includes() ? [] : ['libeigen3-dev'])];
  if (wanted.length === 0 || !has('apt-get')) return;
  const asRoot = process.getuid?.() === 0 ? [] : ['sudo'];
  for (const words of [['update'], ['install', '-y', '--no-install-recommends', ...wanted]]) {
    const [program = '', ...rest] = [...asRoot, 'apt-get', ...words];
    if (spawnSync(program, rest, { stdio: 'inherit' }).status !== 0) return;
  }
}

/** The compiled program, or null where it cannot be made. */
export class EigenPeers {
  private constructor(
    private readonly folder: string,
    private readonly program: string,
  ) {}

  static compiled(): EigenPeers | null {
    const include = includes();
    if (eigenMissing() !== null || include === undefined) return null;
    const folder = mkdtempSync(join(tmpdir(), 'tallyframe-eigen-'));
    const program = join(folder, 'eigen-peer');
    const made = spawnSync(compiler, ['-O3', '-DNDEBUG', '-std=c++17', '-I', include, source, '-o', program], {
      encoding: 'utf8',
    });
    if (made.status !== 0) {
      rmSync(folder, { recursive: true, force: true });
      throw new Error(`eigen-peer.cpp does not compile: ${made.stderr}`);
    }
    return new EigenPeers(folder, program);
  }

  /**
   * A process that holds these frames, ready to be timed.
   * @param how 'ordered': the unknowns come in Eigen's order already, which spares it every permutation
   */
  holding(name: string, frames: readonly Frame[], how: 'shuffled' | 'ordered' = 'shuffled'): EigenPeer {
    const file = join(this.folder, `${name}-${how}.frames`);
    writeFrames(file, frames);
    return new EigenPeer(this.program, file, how);
  }

  close(): void {
    rmSync(this.folder, { recursive: true, force: true });
  }
}

export class EigenPeer {
  private readonly child;
  private readonly lines;
  private readonly file: string;

  constructor(program: string, file: string, how: string) {
    this.file = file;
    this.child = spawn(program, [file, how], { stdio: ['pipe', 'pipe', 'inherit'] });
    this.lines = createInterface({ input: this.child.stdout })[Symbol.asyncIterator]();
  }

  private async ask(words: string): Promise<number> {
    this.child.stdin.write(`${words}\n`);
    const answer = await this.lines.next();
    if (answer.done) throw new Error('eigen-peer ended early');
    return Number(answer.value);
  }

  /** CPU seconds of all frames `times` times: stiffness + load vectors + factor + all load cases. */
  solve(times: number): Promise<number> {
    return this.ask(`solve ${times}`);
  }

  /** CPU seconds of factoring each frame's K, as it stands, and solving one load case, `times` times. */
  bare(times: number): Promise<number> {
    return this.ask(`bare ${times}`);
  }

  /** By frame, case and node: displacements, 3 each. */
  async displacements(): Promise<Float64Array> {
    const out = `${this.file}.displacements`;
    await this.ask(`write ${out}`);
    const bytes = readFileSync(out);
    return new Float64Array(bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.byteLength));
  }

  close(): void {
    this.child.stdin.end();
  }
}
