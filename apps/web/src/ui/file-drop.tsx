/** Takes files by dropping, by a button, and by keyboard; each is stored at once and attached with what is sent later. */
import { Button, Loader } from '@mantine/core';
import { type AttachedFile, FILE_LIMITS, FILE_TYPES } from '@skyberth/shared';
import { type DragEvent, useId, useRef, useState } from 'react';
import { uploadFile } from '../lib/files.js';
import { sentenceOf } from '../lib/problem-fields.js';
import classes from './files.module.css';
import { formatBytes } from './format.js';
import { ProblemNotice } from './problem-notice.js';

const ACCEPT = Object.entries(FILE_TYPES)
  .flatMap(([type, extensions]) => [type, ...extensions.map((each) => `.${each}`)])
  .join(',');

/** Props of `FileDrop`. */
export interface FileDropProps {
  readonly label: string;
  /** What is wanted: `The licence of the spacecraft and the coordination for this site`. */
  readonly hint?: string;
  /** Stored files, not yet attached; send their ids. */
  readonly files: readonly AttachedFile[];
  readonly onChange: (files: readonly AttachedFile[]) => void;
}

/** A place for files with the list of those given so far. */
export function FileDrop({ label, hint, files, onChange }: FileDropProps) {
  const id = useId();
  const input = useRef<HTMLInputElement>(null);
  const [isOver, setOver] = useState(false);
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const take = async (given: readonly File[]) => {
    setBusy(true);
    setProblem(null);
    let kept = files;
    try {
      for (const file of given.slice(0, FILE_LIMITS.perSubject - files.length)) {
        kept = [...kept, await uploadFile(file)];
        onChange(kept);
      }
    } catch (error) {
      setProblem(sentenceOf(error));
    } finally {
      setBusy(false);
    }
  };
  const hasFiles = (event: DragEvent) => event.dataTransfer.types.includes('Files');
  return (
    <fieldset
      className={classes.drop}
      data-over={isOver || undefined}
      aria-describedby={`${id}-hint`}
      onDragOver={(event) => {
        if (!hasFiles(event)) return;
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={(event) => {
        setOver(false);
        if (!hasFiles(event)) return;
        event.preventDefault();
        void take([...event.dataTransfer.files]);
      }}
    >
      <legend>{label}</legend>
      <p id={`${id}-hint`} className={classes.quiet}>
        {hint && `${hint} `}PDF, PNG, JPEG, CSV or plain text, at most 10 MB each. Drop them here or choose them.
      </p>
      {files.length > 0 && (
        <ul className={classes.list} aria-label={`${label}: files given`}>
          {files.map((file) => (
            <li key={file.id}>
              <strong>{file.name}</strong>
              <span className={classes.quiet}>{formatBytes(file.bytes)}</span>
              <Button
                size="xs"
                variant="subtle"
                aria-label={`Leave out ${file.name}`}
                onClick={() => onChange(files.filter((each) => each.id !== file.id))}
              >
                Leave out
              </Button>
            </li>
          ))}
        </ul>
      )}
      {problem && <ProblemNotice title="The file was not taken">{problem}</ProblemNotice>}
      <Button
        variant="default"
        size="sm"
        disabled={busy || files.length >= FILE_LIMITS.perSubject}
        onClick={() => input.current?.click()}
      >
        {busy ? 'Storing it' : 'Choose files'}
      </Button>
      {busy && <Loader size="xs" ml={8} aria-label="Storing the file" />}
      <input
        ref={input}
        type="file"
        multiple
        hidden
        accept={ACCEPT}
        onChange={(event) => {
          const given = [...(event.currentTarget.files ?? [])];
          event.currentTarget.value = '';
          void take(given);
        }}
      />
    </fieldset>
  );
}
