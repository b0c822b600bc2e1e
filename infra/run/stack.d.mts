import type { ChildProcess } from 'node:child_process';

/** What runs, where it answers, and how it ends. */
export interface Stack {
  readonly children: readonly ChildProcess[];
  readonly environment: Readonly<Record<string, string>>;
  readonly urls: Readonly<Record<'app' | 'payments' | 'mail' | 'elements', string>>;
  stop(): Promise<void>;
}

export interface StackOptions {
  readonly port: number;
  readonly dataDir: string;
  readonly api?: boolean;
  readonly demo?: boolean;
  readonly log?: (text: string) => void;
}

export function startStack(options: StackOptions): Promise<Stack>;
