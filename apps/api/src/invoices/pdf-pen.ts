/**
 * Writes text in Manrope on a PDF page. The font comes in pieces by script, so a line is cut into runs, each in the first
 * piece that has its letters. Letters that no piece has become a question mark instead of an empty box.
 */
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import * as fontkit from 'fontkit';
import PDFDocument from 'pdfkit';
import { sfntOf } from './woff.js';

const SCRIPTS = ['latin', 'latin-ext', 'cyrillic', 'greek', 'vietnamese'] as const;
type Script = (typeof SCRIPTS)[number];
export type Weight = 400 | 600;

const require = createRequire(import.meta.url);
const fileOf = (script: Script, weight: Weight): string =>
  require.resolve(`@fontsource/manrope/files/manrope-${script}-${weight}-normal.woff`);

/** Each piece, unpacked when it is first needed and kept: inflating it anew cost most of the time of a page. */
const unpacked = new Map<string, Buffer>();
function fontOf(script: Script, weight: Weight): Buffer {
  const key = `${script}-${weight}`;
  const font = unpacked.get(key) ?? sfntOf(readFileSync(fileOf(script, weight)));
  unpacked.set(key, font);
  return font;
}

/** Which letters each piece has; read once, on the first page that is written. */
let coverage: Map<Script, ReadonlySet<number>> | undefined;
function letters(): Map<Script, ReadonlySet<number>> {
  coverage ??= new Map(SCRIPTS.map((script) => [script, lettersOf(fontOf(script, 400))]));
  return coverage;
}

function lettersOf(file: Buffer): ReadonlySet<number> {
  const font = fontkit.create(file);
  return new Set('characterSet' in font ? font.characterSet : []);
}

interface Run {
  readonly script: Script;
  text: string;
}

/** The text in runs of one piece each. Narrow spaces, which the font lacks, become no-break spaces. */
export function runsOf(text: string): Run[] {
  const runs: Run[] = [];
  for (const given of text.normalize('NFC').replace(/[\u202f\u2009]/g, '\u00a0')) {
    const code = given.codePointAt(0) ?? 0;
    const last = runs.at(-1);
    const keeps = last && letters().get(last.script)?.has(code);
    const script = keeps ? last.script : SCRIPTS.find((each) => letters().get(each)?.has(code));
    const letter = script ? given : '?';
    if (last && (last.script === (script ?? 'latin') || keeps)) last.text += letter;
    else runs.push({ script: script ?? 'latin', text: letter });
  }
  return runs;
}

export interface Ink {
  readonly sizePt: number;
  readonly weight?: Weight;
  readonly colour?: string;
}

/** A document and a hand that writes on it; positions in points from the upper left corner of the page. */
export class PdfPen {
  readonly doc: PDFKit.PDFDocument;

  /** `createdMs` stands in the file; with the same content it makes the same bytes, hence no compression by a library either. */
  constructor(facts: { title: string; author: string; createdMs: number }) {
    const CreationDate = new Date(facts.createdMs);
    this.doc = new PDFDocument({
      size: 'A4',
      margin: 0,
      autoFirstPage: false,
      bufferPages: true,
      compress: false,
      lang: 'en',
      info: { Title: facts.title, Author: facts.author, Creator: 'Skyberth', Producer: 'Skyberth', CreationDate },
    });
    for (const script of SCRIPTS) {
      for (const weight of [400, 600] as const) this.doc.registerFont(`${script}-${weight}`, fontOf(script, weight));
    }
  }

  widthOf(text: string, ink: Ink): number {
    return runsOf(text).reduce((sum, run) => sum + this.use(run, ink).widthOfString(run.text), 0);
  }

  /** One line whose top is at `y`; `x` is its left end, or its right end where `toLeft`. */
  line(text: string, at: { x: number; y: number; toLeft?: boolean }, ink: Ink): void {
    let x = at.toLeft ? at.x - this.widthOf(text, ink) : at.x;
    for (const run of runsOf(text)) {
      const doc = this.use(run, ink).fillColor(ink.colour ?? '#14303A');
      doc.text(run.text, x, at.y, { lineBreak: false });
      x += doc.widthOfString(run.text);
    }
  }

  /** Lines broken at spaces so that none is wider than `widthPt`, except a single word that is. */
  wrapped(text: string, widthPt: number, ink: Ink): string[] {
    const lines: string[] = [];
    for (const word of text.split(' ')) {
      const last = lines.at(-1);
      const longer = last === undefined ? word : `${last} ${word}`;
      if (last !== undefined && this.widthOf(longer, ink) <= widthPt) lines[lines.length - 1] = longer;
      else lines.push(word);
    }
    return lines;
  }

  rule(fromX: number, toX: number, y: number, weightPt = 0.7): void {
    this.doc.moveTo(fromX, y).lineTo(toX, y).lineWidth(weightPt).strokeColor('#14303A').stroke();
  }

  /** Closes the document and answers the file. */
  finish(): Promise<Buffer> {
    return new Promise((resolve, reject) => {
      const chunks: Buffer[] = [];
      this.doc.on('data', (chunk: Buffer) => chunks.push(chunk));
      this.doc.on('end', () => resolve(Buffer.concat(chunks)));
      this.doc.on('error', reject);
      this.doc.end();
    });
  }

  private use(run: Run, ink: Ink): PDFKit.PDFDocument {
    return this.doc.font(`${run.script}-${ink.weight ?? 400}`).fontSize(ink.sizePt);
  }
}
