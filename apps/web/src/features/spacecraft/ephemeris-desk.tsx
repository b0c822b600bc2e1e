/** Giving a spacecraft its operator's own ephemeris: text or file, whose it is, and what is wrong where it is refused. */
import { Button, FileButton, Select } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { EPHEMERIS_LIMITS, routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useRef, useState } from 'react';
import { call, ProblemError } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { spacecraftQueries } from '../../lib/spacecraft-queries.js';
import { useLeaveGuard } from '../../lib/use-leave-guard.js';
import { formatBytes, formatNumber } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { DropArea } from './drop-area.js';
import { ElementText, type ElementTextHandle } from './element-text.js';
import elementClasses from './elements.module.css';
import { EphemerisList } from './ephemeris-list.js';
import { faultyLine } from './ephemeris-words.js';
import classes from './spacecraft.module.css';

interface EphemerisDeskProps {
  readonly craftId: string | null;
  readonly onCraft: (id: string | null) => void;
}

const EMPTY = { text: '', fileName: null as string | null };

export function EphemerisDesk({ craftId, onCraft }: EphemerisDeskProps) {
  const [given, setGiven] = useState(EMPTY);
  const [fileFault, setFileFault] = useState<string | null>(null);
  const text = useRef<ElementTextHandle>(null);
  const craft = useQuery(spacecraftQueries.list());
  const keep = useKeep(craftId, () => setGiven(EMPTY));
  useLeaveGuard(given.text !== '', 'this ephemeris');
  const takeFile = async (file: File | null) => {
    if (!file) return;
    const isTooLarge = file.size > EPHEMERIS_LIMITS.characters;
    setFileFault(isTooLarge ? `${file.name} has ${formatBytes(file.size)}; at most 20 MB are taken. Split it.` : null);
    keep.reset();
    if (!isTooLarge) setGiven({ text: await file.text(), fileName: file.name });
  };
  const faults = keep.error instanceof ProblemError ? (keep.error.problem?.errors ?? []) : [];
  const lines = faults.flatMap(({ detail }) => faultyLine(detail) ?? []);
  const own = craft.data?.items.find((one) => one.id === craftId);
  return (
    <div className={elementClasses.desk}>
      <DropArea label="Orbit ephemeris message; a file may be dropped here" onFile={takeFile}>
        <div className={elementClasses.textHead}>
          <label className={classes.heading} htmlFor="ephemeris-text">
            Orbit ephemeris message
          </label>
          <span className={classes.quiet}>{given.fileName && `from ${given.fileName}`}</span>
        </div>
        <ElementText
          ref={text}
          id="ephemeris-text"
          describedBy="ephemeris-help"
          value={given.text}
          onChange={(next) => {
            keep.reset();
            setGiven((now) => ({ text: next, fileName: next === '' ? null : now.fileName }));
          }}
          onPasted={() => undefined}
          faultyLines={new Set(lines)}
        />
      </DropArea>
      <div className={elementClasses.deskActs}>
        <Select
          className={elementClasses.attach}
          label="Belongs to"
          placeholder="Choose the spacecraft"
          data={(craft.data?.items ?? []).map((one) => ({ value: one.id, label: one.name }))}
          value={craftId}
          onChange={onCraft}
          searchable
          nothingFoundMessage="None of your spacecraft"
        />
        <div className={classes.acts}>
          <FileButton onChange={takeFile} accept=".oem,.txt,.xml,.kvn,text/plain">
            {(button) => (
              <Button variant="default" {...button}>
                Choose a file
              </Button>
            )}
          </FileButton>
          <Button
            onClick={() => keep.mutate(given)}
            loading={keep.isPending}
            disabled={craftId === null || given.text.trim() === ''}
          >
            Keep it
          </Button>
        </div>
      </div>
      <p id="ephemeris-help" className={classes.help}>
        CCSDS OEM as KVN or XML, in EME2000, ICRF, GCRF, ITRF or TEME; at most 20 MB and{' '}
        {formatNumber(EPHEMERIS_LIMITS.states)} states. It is kept as a whole or not at all. Where two reach an instant,
        the one given last counts. Passes outside its span need an element set, so give one of those too.
      </p>
      <div aria-live="polite" className={classes.stack}>
        {fileFault && <ProblemNotice title="The file was not read">{fileFault}</ProblemNotice>}
        {keep.error && (
          <ProblemNotice
            title="Nothing was kept"
            items={faults.slice(0, 20).map(({ detail }) => ({ message: detail }))}
            {...(lines[0] && {
              onRetry: () => text.current?.showLine(lines[0] ?? 1),
              retryLabel: `Show line ${lines[0]}`,
            })}
          >
            {sentenceOf(keep.error)}
          </ProblemNotice>
        )}
      </div>
      {own && <EphemerisList craft={own} mayWrite={false} />}
    </div>
  );
}

function useKeep(craftId: string | null, onKept: () => void) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: typeof EMPTY) => call(routes.addEphemeris, { params: { id: craftId ?? '' }, body }),
    onSuccess: (kept) => {
      void client.invalidateQueries({ queryKey: spacecraftQueries.all });
      void client.invalidateQueries({ queryKey: ['passes'] });
      void client.invalidateQueries({ queryKey: ['bookings'] });
      notifications.show({ message: `${formatNumber(kept.states)} states of ${kept.objectName} are kept and in use.` });
      onKept();
    },
  });
}
