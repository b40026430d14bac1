/** The command line: the same intake, analysis and checks as the web application, without server or account. */
import { mkdir, readFile } from 'node:fs/promises';
import { basename, dirname, resolve } from 'node:path';
import { readIntake } from '@/lib/intake/read-intake';
import type { InputFile, Intake } from '@/lib/intake/intake';
import { readArguments, usage, type BatchArguments } from '@/worker/command/arguments';
import { evaluateBatch, type EvaluatedBatch } from '@/worker/command/evaluate-batch';
import { ProgressBar } from '@/worker/command/progress-bar';
import { errorLines, summarise } from '@/worker/command/summary';
import { writeCsvFolder, writeJsonFile, writeReportFile, writeWorkbookFile } from '@/worker/threads/write-files';

/**
 * Runs the command with the words typed after `--`, paths relative to `folder`.
 * @returns 0 every frame solved · 1 some not · 2 nothing could be read (not one frame was found), or the arguments make no sense
 */
export async function runBatch(words: readonly string[], folder: string): Promise<0 | 1 | 2> {
  const wanted = readArguments(words);
  if ('wrong' in wanted) {
    process.stderr.write(`${wanted.wrong}\n\n${usage}\n`);
    return 2;
  }
  const files = await readFiles(wanted.files, folder);
  if (!files) return 2;
  const intake = await readIntake(files);
  const bar = new ProgressBar(intake.frames.filter(({ frame }) => frame !== null).length);
  const batch = await evaluateBatch(intake, { all: wanted.all, onDone: (done) => bar.show(done) });
  bar.end();
  try {
    if (!(await writeOutputs(batch, wanted, folder))) return 2;
    if (intake.frames.length === 0 && noneIsToRun(intake)) {
      process.stderr.write('Every frame in Frames has no in run, so there was nothing to solve.\n');
      return 0;
    }
    if (intake.frames.length === 0) {
      process.stderr.write(`${errorLines(intake.problems, 20).join('\n') || 'No frame was found in what was sent.'}\n`);
      return 2;
    }
    if (!wanted.json && !wanted.xlsx && !wanted.csv && !wanted.report) process.stdout.write(await summarise(batch));
    if (batch.solved === intake.frames.length) return 0;
    const words = `${intake.frames.length - batch.solved} of ${intake.frames.length} frames not solved: the results say why.`;
    // like the progress bar: where a person watches
    if (process.stderr.isTTY) process.stderr.write(`${words}\n`);
    return 1;
  } finally {
    batch.close();
  }
}

/** True where the sheets list frames and hold no error, and yet none is left to solve. */
function noneIsToRun({ sheets, problems }: Intake): boolean {
  const listed = sheets.some(({ known, rows }) => known === 'Frames' && rows > 0);
  return listed && !problems.some((problem) => problem.severity === 'error');
}

async function readFiles(names: readonly string[], folder: string): Promise<InputFile[] | null> {
  const files: InputFile[] = [];
  for (const name of names) {
    try {
      files.push({ name: basename(name), bytes: await readFile(resolve(folder, name)) });
    } catch (error) {
      process.stderr.write(`${name} could not be read: ${why(error)}.\n`);
      return null;
    }
  }
  return files;
}

async function writeOutputs(batch: EvaluatedBatch, wanted: BatchArguments, folder: string): Promise<boolean> {
  const outputs: readonly (readonly [string | null, (path: string) => Promise<void>])[] = [
    [wanted.json, (path) => writeJsonFile(batch, path, { all: wanted.all })],
    [wanted.xlsx, (path) => writeWorkbookFile(batch, path)],
    [wanted.csv, (path) => writeCsvFolder(batch, path)],
    [wanted.report, (path) => writeReportFile(batch, path)],
  ];
  for (const [name, write] of outputs) {
    if (name === null) continue;
    const path = resolve(folder, name);
    try {
      await mkdir(dirname(path), { recursive: true });
      await write(path);
    } catch (error) {
      if (!isFileError(error)) throw error;
      process.stderr.write(`${name} could not be written: ${why(error)}.\n`);
      return false;
    }
  }
  return true;
}

const isFileError = (error: unknown): error is NodeJS.ErrnoException => error instanceof Error && 'syscall' in error;

function why(error: unknown): string {
  if (!isFileError(error)) return String(error);
  const words: Record<string, string> = {
    ENOENT: 'there is no such file or folder',
    EACCES: 'it is not allowed',
    EISDIR: 'it is a folder',
    ENOTDIR: 'a part of its path is not a folder',
    ENOSPC: 'the disk is full',
  };
  return words[error.code ?? ''] ?? error.message;
}
