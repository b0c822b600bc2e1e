import { spawnSync } from 'node:child_process';

/** The words of a PDF file, laid out as on paper; fails where the file is no PDF or `pdftotext` is missing. */
export function pdfText(file: Buffer): string {
  const read = spawnSync('pdftotext', ['-layout', '-', '-'], { input: file, encoding: 'utf8' });
  if (read.error)
    throw new Error(`pdftotext could not be started (Debian: apt-get install poppler-utils). ${read.error.message}`);
  if (read.status !== 0) throw new Error(`pdftotext could not read the file: ${read.stderr}`);
  return read.stdout;
}
