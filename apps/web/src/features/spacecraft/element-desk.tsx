/** The desk: text or file, whose it is, what was read, and the saving of it. */
import { Button, FileButton, Loader, Select } from '@mantine/core';
import { useQuery } from '@tanstack/react-query';
import { useRef, useState } from 'react';
import { ProblemError } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { spacecraftQueries } from '../../lib/spacecraft-queries.js';
import { useLeaveGuard } from '../../lib/use-leave-guard.js';
import { formatBytes } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { DropArea } from './drop-area.js';
import { ElementReading } from './element-reading.js';
import { ElementSaving } from './element-saving.js';
import { ElementText, type ElementTextHandle } from './element-text.js';
import elementClasses from './elements.module.css';
import classes from './spacecraft.module.css';
import type { ElementDeskState } from './use-element-desk.js';

interface ElementDeskProps {
  readonly desk: ElementDeskState;
  readonly attachTo: string | null;
  readonly onAttach: (id: string | null) => void;
}

/** A file above this is not even opened. */
const MOST_FILE_BYTES = 8_000_000;

export function ElementDesk({ desk, attachTo, onAttach }: ElementDeskProps) {
  const text = useRef<ElementTextHandle>(null);
  const [fileFault, setFileFault] = useState<string | null>(null);
  const craft = useQuery(spacecraftQueries.list());
  useLeaveGuard(desk.reading !== null && desk.reading.good.length > 0, 'these elements');
  const takeFile = async (file: File | null) => {
    if (!file) return;
    const isTooLarge = file.size > MOST_FILE_BYTES;
    setFileFault(
      isTooLarge ? `${file.name} has ${formatBytes(file.size)}; at most 8 MB are read at once. Split it.` : null,
    );
    if (!isTooLarge) desk.take({ text: await file.text(), fileName: file.name });
  };
  const faults = desk.reading?.faults ?? [];
  const faultyLines = new Set(faults.map((fault) => fault.line));
  const showLine = (line: number) => text.current?.showLine(line);
  const attachedTo = craft.data?.items.find((one) => one.id === attachTo) ?? null;
  return (
    <div className={elementClasses.desk}>
      <DropArea label="Element sets; a file may be dropped here" onFile={takeFile}>
        <div className={elementClasses.textHead}>
          <label className={classes.heading} htmlFor="elements-text">
            Element sets
          </label>
          <span className={classes.quiet}>{desk.desk.fileName && `from ${desk.desk.fileName}`}</span>
        </div>
        <ElementText
          ref={text}
          id="elements-text"
          describedBy="elements-help"
          value={desk.desk.text}
          onChange={desk.type}
          onPasted={(pasted) => desk.take({ text: pasted, fileName: null })}
          faultyLines={faultyLines}
        />
      </DropArea>
      <div className={elementClasses.deskActs}>
        <AttachSelect
          items={craft.data?.items ?? []}
          attachTo={attachTo}
          onAttach={(id) => {
            onAttach(id);
            desk.readAgain(id);
          }}
        />
        <ReadActs desk={desk} onFile={takeFile} />
      </div>
      <p id="elements-help" className={classes.help}>
        Two-line sets with or without names, or CCSDS orbit mean-elements messages as KVN, XML, JSON or CSV; many at
        once. Pasted text and files are read by themselves.
      </p>
      {fileFault && <ProblemNotice title="The file was not read">{fileFault}</ProblemNotice>}
      {desk.isTooLong && (
        <ProblemNotice title="That is too long">At most 8 MB are read at once. Give it in parts.</ProblemNotice>
      )}
      <ReadingPart desk={desk} onShowLine={showLine} onAttach={onAttach} attachedTo={attachedTo} />
    </div>
  );
}

interface ReadingPartProps extends Pick<ElementDeskProps, 'desk' | 'onAttach'> {
  readonly onShowLine: (line: number) => void;
  readonly attachedTo: Parameters<typeof ElementSaving>[0]['attachedTo'];
}

function ReadingPart({ desk, onShowLine, onAttach, attachedTo }: ReadingPartProps) {
  const { reading } = desk;
  const detach = () => {
    onAttach(null);
    desk.readAgain(null);
  };
  return (
    <div aria-live="polite" className={classes.stack}>
      {desk.readError && (
        <ProblemNotice
          title="The text could not be read"
          {...(attachedTo && isInputRefused(desk.readError)
            ? { onRetry: detach, retryLabel: 'Let each set’s own number decide' }
            : { onRetry: () => desk.readAgain() })}
        >
          {sentenceOf(desk.readError)}
        </ProblemNotice>
      )}
      {desk.hasChangedSince && !desk.isReading && (
        <p className={classes.note}>
          The text has changed since it was read. Read it again to see what saving would do.
        </p>
      )}
      {reading && reading.good.length + reading.faults.length === 0 && (
        <ProblemNotice title="No element set was found in it">
          A two-line set begins with 1 and 2; an OMM names OBJECT_NAME and EPOCH.
        </ProblemNotice>
      )}
      {reading && <ElementReading good={reading.good} faults={reading.faults} onShowLine={onShowLine} />}
      {desk.saveError && <SaveRefused error={desk.saveError} />}
      {reading && reading.good.length > 0 && (
        <ElementSaving
          good={reading.good}
          faultCount={reading.faults.length}
          attachedTo={attachedTo}
          isSaving={desk.isSaving}
          onSave={desk.save}
        />
      )}
    </div>
  );
}

const isInputRefused = (error: Error): boolean => error instanceof ProblemError && error.problem?.code === 'bad-input';

function SaveRefused({ error }: { readonly error: Error }) {
  const items = error instanceof ProblemError ? (error.problem?.errors ?? []) : [];
  return (
    <ProblemNotice title="Nothing was saved" items={items.slice(0, 10).map(({ detail }) => ({ message: detail }))}>
      {sentenceOf(error)}
    </ProblemNotice>
  );
}

interface AttachSelectProps {
  readonly items: readonly { readonly id: string; readonly name: string }[];
  readonly attachTo: string | null;
  readonly onAttach: (id: string | null) => void;
}

function AttachSelect({ items, attachTo, onAttach }: AttachSelectProps) {
  return (
    <Select
      className={elementClasses.attach}
      label="Belongs to"
      data={[
        { value: '', label: 'The spacecraft that each set names' },
        ...items.map((one) => ({ value: one.id, label: `One set, of ${one.name}` })),
      ]}
      value={attachTo ?? ''}
      onChange={(id) => onAttach(id || null)}
      allowDeselect={false}
      searchable
      nothingFoundMessage="None of your spacecraft"
    />
  );
}

function ReadActs({ desk, onFile }: Pick<ElementDeskProps, 'desk'> & { readonly onFile: (file: File | null) => void }) {
  const isRead = desk.reading !== null;
  return (
    <div className={classes.acts}>
      <FileButton onChange={onFile} accept=".txt,.tle,.3le,.xml,.json,.csv,.kvn,.omm,text/plain">
        {(button) => (
          <Button variant="default" {...button}>
            Choose a file
          </Button>
        )}
      </FileButton>
      {desk.isReading ? (
        <>
          <Loader size="sm" aria-hidden="true" />
          <span role="status">Reading</span>
          <Button variant="default" onClick={desk.cancel}>
            Cancel
          </Button>
        </>
      ) : (
        !isRead && (
          <Button onClick={() => desk.readAgain()} disabled={desk.desk.text.trim() === '' || desk.isTooLong}>
            {desk.hasChangedSince ? 'Read again' : 'Read'}
          </Button>
        )
      )}
    </div>
  );
}
