/** Reads an OEM in KVN, the form of keywords and lines. Source: CCSDS 502.0-B section 5 and 7. */
import { parseCcsdsTime } from './ccsds-time.js';
import { toUtcMs } from './leap-seconds.js';
import { type FaultList, LONGEST_QUOTE, type Oem, type OemCovariance, type OemSegment } from './oem.js';
import {
  type Field,
  HEADER_KEYWORDS,
  METADATA_KEYWORDS,
  type OemMetadata,
  readHeader,
  readMetadata,
} from './oem-fields.js';
import { parseCcsdsNumber, StateTable } from './oem-states.js';

const KEYWORD_LINE = /^([A-Z][A-Z0-9_]*)\s*=\s*(.*)$/;

type Place = 'header' | 'metadata' | 'states' | 'covariance';

/** Reads line by line; where it stands decides what a line may be. */
class KvnReader {
  private place: Place = 'header';
  private readonly header = new Map<string, Field>();
  private readonly comments: string[] = [];
  private readonly segments: OemSegment[] = [];
  private metadataFields = new Map<string, Field>();
  private metadata: OemMetadata | undefined;
  private table: StateTable | undefined;
  private segmentComments: string[] = [];
  private covariances: OemCovariance[] = [];
  private covariance: { epochMs: number; frame: string | undefined; numbers: number[] } | undefined;
  private blockLine = 1;
  private firstTimeSystem: string | undefined;

  constructor(private readonly faults: FaultList) {}

  read(text: string): Oem | undefined {
    text.split(/\r\n|\n|\r/).forEach((raw, index) => {
      const line = raw.trim();
      if (line !== '') this.line(line, index + 1);
    });
    this.endOfText();
    const header = readHeader(this.header, this.faults);
    if (this.segments.length === 0 && !this.faults.any) {
      this.faults.add({ line: 1, field: 'META_START', found: '', expected: 'at least one segment' });
    }
    return this.faults.any ? undefined : { ...header, comments: this.comments, segments: this.segments };
  }

  private line(line: string, number: number): void {
    if (line === 'COMMENT' || line.startsWith('COMMENT ')) {
      const comment = line.slice(8);
      if (this.place === 'header') this.comments.push(comment);
      else this.segmentComments.push(comment);
      return;
    }
    if (/^[A-Z]+_(START|STOP)$/.test(line)) {
      this.marker(line, number);
      return;
    }
    const keyword = KEYWORD_LINE.exec(line);
    if (keyword) this.keyword(keyword[1]!, keyword[2]!.trim(), number);
    else if (this.place === 'states') this.table?.add(line.split(/\s+/), number);
    else if (this.place === 'metadata' && /^\d{4}-/.test(line)) this.stateInMetadata(line, number);
    else if (this.place === 'covariance') this.covarianceRow(line, number);
    else this.unexpected(line, number, 'a keyword, an equals sign and a value');
  }

  /** One fault for the missing marker, not one for each state that follows. */
  private stateInMetadata(line: string, number: number): void {
    const message = `Line ${number}: states begin before META_STOP; the block that begins in line ${this.blockLine} is never closed.`;
    this.faults.add({ line: number, field: 'META_STOP', found: line, expected: 'META_STOP', message });
    this.openStates();
    this.table?.add(line.split(/\s+/), number);
  }

  private marker(marker: string, line: number): void {
    if (marker === 'META_START' && (this.place === 'header' || this.place === 'states')) {
      this.closeSegment();
      this.place = 'metadata';
      this.metadataFields = new Map();
      this.segmentComments = [];
      this.blockLine = line;
    } else if (marker === 'META_STOP' && this.place === 'metadata') {
      this.openStates();
    } else if (marker === 'COVARIANCE_START' && this.place === 'states') {
      this.place = 'covariance';
    } else if (marker === 'COVARIANCE_STOP' && this.place === 'covariance') {
      this.closeCovariance(line);
      this.place = 'states';
    } else {
      this.unexpected(marker, line, `a line that belongs to the ${this.place}`);
    }
  }

  private keyword(name: string, value: string, line: number): void {
    if (this.place === 'covariance' && (name === 'EPOCH' || name === 'COV_REF_FRAME')) {
      this.covarianceKeyword(name, value, line);
      return;
    }
    const known = this.place === 'header' ? HEADER_KEYWORDS : this.place === 'metadata' ? METADATA_KEYWORDS : [];
    const fields = this.place === 'header' ? this.header : this.metadataFields;
    if (!known.includes(name)) {
      this.unexpected(name, line, `a keyword of the ${this.place}`);
    } else if (fields.has(name)) {
      this.faults.add({ line, field: name, found: value, expected: 'each keyword once' });
    } else {
      fields.set(name, { value, line });
    }
  }

  private unexpected(found: string, line: number, expected: string): void {
    const word = found.split(/[\s=]/, 1)[0]!.slice(0, LONGEST_QUOTE);
    this.faults.add({
      line,
      field: word,
      found,
      expected,
      message: `Line ${line}: ${word} is not expected here; expected ${expected}.`,
    });
  }

  private openStates(): void {
    this.place = 'states';
    this.metadata = readMetadata(this.metadataFields, this.blockLine, this.faults);
    this.table = this.metadata && new StateTable(this.metadata, this.faults);
    this.covariances = [];
    const system = this.metadataFields.get('TIME_SYSTEM');
    if (system === undefined) return;
    this.firstTimeSystem ??= system.value;
    if (system.value !== this.firstTimeSystem) {
      this.faults.add({
        line: system.line,
        field: 'TIME_SYSTEM',
        found: system.value,
        expected: `${this.firstTimeSystem} as in the first segment`,
      });
    }
  }

  private closeSegment(): void {
    const segment = this.table?.finish(this.blockLine, this.segmentComments, this.covariances);
    if (segment) this.segments.push(segment);
    this.table = undefined;
  }

  private covarianceKeyword(name: string, value: string, line: number): void {
    if (name === 'COV_REF_FRAME') {
      if (this.covariance) this.covariance.frame = value;
      else this.unexpected(name, line, 'EPOCH first');
      return;
    }
    this.closeCovariance(line);
    const clockMs = parseCcsdsTime(value);
    if (clockMs === undefined || this.metadata === undefined) {
      this.faults.add({ line, field: 'EPOCH', found: value, expected: 'a date such as 2026-12-01T00:00:00' });
      return;
    }
    this.covariance = { epochMs: toUtcMs(clockMs, this.metadata.timeSystem), frame: undefined, numbers: [] };
  }

  private covarianceRow(line: string, number: number): void {
    const numbers = line.split(/\s+/).map(parseCcsdsNumber);
    if (this.covariance === undefined || numbers.includes(undefined)) {
      this.faults.add({ line: number, field: 'covariance', found: line, expected: 'EPOCH, then six rows of numbers' });
      return;
    }
    this.covariance.numbers.push(...(numbers as number[]));
  }

  private closeCovariance(line: number): void {
    if (this.covariance === undefined) return;
    const { epochMs, frame, numbers } = this.covariance;
    this.covariance = undefined;
    if (numbers.length !== 21) {
      this.faults.add({
        line,
        field: 'covariance',
        found: `${numbers.length} numbers`,
        expected: '21, the lower triangle of 6 by 6',
      });
      return;
    }
    this.covariances.push({ epochMs, frame, lowerTriangle: numbers });
  }

  private endOfText(): void {
    if (this.place === 'metadata' || this.place === 'covariance') {
      const marker = this.place === 'metadata' ? 'META_STOP' : 'COVARIANCE_STOP';
      const message = `Line ${this.blockLine}: the block that begins here is never closed by ${marker}.`;
      this.faults.add({ line: this.blockLine, field: marker, found: '', expected: marker, message });
    }
    this.closeSegment();
  }
}

/** The message, or undefined with every fault in the list. */
export function readOemKvn(text: string, faults: FaultList): Oem | undefined {
  return new KvnReader(faults).read(text);
}
