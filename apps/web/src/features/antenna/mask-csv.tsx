/** Masks come and go as CSV: read by the server with a sentence for each faulty line, written here. */
import { Button, FileButton, Group, Modal, Stack, Textarea } from '@mantine/core';
import { routes } from '@skyberth/shared';
import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import type { EditableMaskPoint } from '../../drawing/mask-editor/mask-editor-types.js';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { csvOf, pointsOf } from './mask-draft.js';
import classes from './mask-tab.module.css';

interface MaskCsvProps {
  readonly points: readonly EditableMaskPoint[];
  readonly antennaName: string;
  readonly mayWrite: boolean;
  readonly onRead: (points: readonly EditableMaskPoint[]) => void;
}

export function MaskCsv(props: MaskCsvProps) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button variant="default" onClick={() => setOpen(true)}>
        CSV
      </Button>
      <Modal
        opened={isOpen}
        onClose={() => setOpen(false)}
        title={`Mask of ${props.antennaName} as CSV`}
        size="lg"
        closeButtonProps={{ 'aria-label': 'Close' }}
      >
        <CsvDesk {...props} onDone={() => setOpen(false)} />
      </Modal>
    </>
  );
}

function CsvDesk({ points, antennaName, mayWrite, onRead, onDone }: MaskCsvProps & { readonly onDone: () => void }) {
  const [text, setText] = useState(csvOf(points));
  const read = useMutation({
    mutationFn: (given: string) => call(routes.readMaskCsv, { body: { text: given } }),
    onSuccess: (result) => {
      if (result.faults.length > 0 || result.points.length === 0) return;
      onRead(pointsOf(result.points));
      onDone();
    },
  });
  const upload = async (file: File | null) => {
    if (!file) return;
    const given = await file.text();
    setText(given);
    read.mutate(given);
  };
  const faults = read.data?.faults ?? [];
  const good = read.data?.points ?? [];
  return (
    <Stack>
      <Textarea
        label="Azimuth and elevation in degrees, one point a line"
        description="From north through east. Paste here, or upload a file."
        value={text}
        onChange={(event) => setText(event.currentTarget.value)}
        readOnly={!mayWrite}
        autosize
        minRows={8}
        maxRows={16}
        spellCheck={false}
      />
      {read.error && <ProblemNotice title="The text could not be read">{sentenceOf(read.error)}</ProblemNotice>}
      {faults.length > 0 && (
        <ProblemNotice
          title={`${faults.length} ${faults.length === 1 ? 'line' : 'lines'} cannot be used`}
          items={faults.map(({ message }) => ({ message }))}
        >
          Mend them above and read again{good.length > 0 && `, or take the ${good.length} good ones`}.
        </ProblemNotice>
      )}
      <Group className={classes.csvActs}>
        {mayWrite && (
          <>
            <Button onClick={() => read.mutate(text)} loading={read.isPending}>
              Read it into the draft
            </Button>
            <FileButton onChange={upload} accept=".csv,text/csv,text/plain">
              {(button) => (
                <Button variant="default" {...button}>
                  Upload a file
                </Button>
              )}
            </FileButton>
            {faults.length > 0 && good.length > 0 && (
              <Button
                variant="default"
                onClick={() => {
                  onRead(pointsOf(good));
                  onDone();
                }}
              >
                Take the {good.length} good ones
              </Button>
            )}
          </>
        )}
        <Button
          variant="default"
          component="a"
          href={`data:text/csv;charset=utf-8,${encodeURIComponent(csvOf(points))}`}
          download={`${antennaName.toLowerCase().replaceAll(/[^a-z0-9]+/g, '-')}-mask.csv`}
        >
          Download
        </Button>
      </Group>
    </Stack>
  );
}
