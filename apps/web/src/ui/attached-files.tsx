/** Files that hang on something, to be saved one by one. */
import { Anchor } from '@mantine/core';
import type { AttachedFile } from '@skyberth/shared';
import { fileAddress } from '../lib/files.js';
import { DayTime } from './day-time.js';
import classes from './files.module.css';
import { formatBytes } from './format.js';

/** Props of `AttachedFiles`. */
export interface AttachedFilesProps {
  readonly files: readonly AttachedFile[];
  /** Names the list for a screen reader: `Papers of clearance 12`. */
  readonly label: string;
}

/** `licence.pdf · 1.2 MB · Ada, 2026-335 14:05`; nothing where there is none. */
export function AttachedFiles({ files, label }: AttachedFilesProps) {
  if (files.length === 0) return null;
  return (
    <ul className={classes.list} aria-label={label}>
      {files.map((file) => (
        <li key={file.id}>
          <Anchor href={fileAddress(file.id)} download={file.name}>
            {file.name}
          </Anchor>
          <span className={classes.quiet}>
            {formatBytes(file.bytes)}, {file.uploadedByName}, <DayTime atMs={Date.parse(file.uploadedUtc)} />
          </span>
        </li>
      ))}
    </ul>
  );
}
