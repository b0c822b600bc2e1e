/** Asking for a clearance, or renewing one: spacecraft, station and band, dates, purpose and papers. */
import { Button, NativeSelect, Paper, Skeleton, Textarea, TextInput } from '@mantine/core';
import { type AttachedFile, type Band, type Clearance, routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { type FormEvent, useState } from 'react';
import { useNavigate, useSearchParams } from 'react-router-dom';
import { call, ProblemError } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { serverNowMs } from '../../lib/server-clock.js';
import { spacecraftQueries } from '../../lib/spacecraft-queries.js';
import { useTitle } from '../../lib/use-title.js';
import { FileDrop } from '../../ui/file-drop.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { clearanceMoved, clearanceQueries } from './clearance-queries.js';
import classes from './clearances.module.css';
import { TransmitCaution } from './transmit-caution.js';

const YEAR_MS = 365 * 86_400_000;
const dayOf = (timeMs: number): string => new Date(timeMs).toISOString().slice(0, 10);

interface Draft {
  readonly spacecraftId: string;
  readonly stationId: string;
  readonly band: string;
  readonly from: string;
  readonly to: string;
  readonly purpose: string;
}

export function RequestClearancePage() {
  useTitle('Ask for a clearance');
  const [search] = useSearchParams();
  const renews = search.get('renews');
  const earlier = useQuery({ ...clearanceQueries.one(renews ?? ''), enabled: renews !== null });
  return (
    <>
      <PageTitle title={renews === null ? 'Ask for a clearance' : 'Renew a clearance'}>
        The station looks at your papers and answers, then the marketplace checks them. You hear of each step by mail.
      </PageTitle>
      <div className={classes.columns}>
        {renews !== null && earlier.isPending ? (
          <Skeleton height={320} />
        ) : (
          <RequestForm first={firstDraft(search, earlier.data)} antennaId={search.get('antenna')} />
        )}
        <TransmitCaution />
      </div>
    </>
  );
}

/** A renewal begins where the earlier clearance ends; a link from a pass names the spacecraft and its antenna. */
function firstDraft(search: URLSearchParams, earlier: Clearance | undefined): Draft {
  const nowMs = serverNowMs();
  const fromMs = earlier?.state === 'in force' ? Date.parse(earlier.validToUtc) : nowMs;
  return {
    spacecraftId: earlier?.spacecraftId ?? search.get('spacecraft') ?? '',
    stationId: earlier?.stationId ?? '',
    band: earlier?.band ?? '',
    from: dayOf(fromMs),
    to: dayOf(fromMs + YEAR_MS),
    purpose: earlier?.purpose ?? '',
  };
}

interface RequestFormProps {
  readonly first: Draft;
  /** Of the pass that needs the clearance; its station is proposed. */
  readonly antennaId: string | null;
}

function RequestForm({ first, antennaId }: RequestFormProps) {
  const [draft, setDraft] = useState(first);
  const [files, setFiles] = useState<readonly AttachedFile[]>([]);
  const fleet = useQuery(spacecraftQueries.list());
  const choices = useQuery(clearanceQueries.choices);
  const ask = useAsk();
  const change = (part: Partial<Draft>) => setDraft({ ...draft, ...part });
  const stations = choices.data?.stations ?? [];
  const linked = stations.find(({ antennaIds }) => antennaIds.includes(antennaId ?? ''))?.id ?? '';
  const stationId = draft.stationId || linked;
  const bands = stations.find((station) => station.id === stationId)?.bands ?? [];
  const band = bands.find((each) => each === draft.band) ?? bands[0];
  const problem = ask.error instanceof ProblemError ? ask.error : null;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    if (band) ask.mutate({ draft: { ...draft, stationId }, band, fileIds: files.map((file) => file.id) });
  };
  const unread = fleet.error ?? choices.error;
  if (unread) return <ProblemNotice title="The form could not be prepared">{sentenceOf(unread)}</ProblemNotice>;
  return (
    <Paper component="form" withBorder className={classes.card} onSubmit={submit} aria-label="Request">
      {ask.error && <ProblemNotice title="It was not asked for">{sentenceOf(ask.error)}</ProblemNotice>}
      <NativeSelect
        label="Spacecraft"
        required
        value={draft.spacecraftId}
        data={[
          { value: '', label: 'Choose one' },
          ...(fleet.data?.items ?? []).map((craft) => ({ value: craft.id, label: craft.name })),
        ]}
        onChange={(event) => change({ spacecraftId: event.currentTarget.value })}
      />
      <NativeSelect
        label="Station"
        description="Stations on the market that transmit."
        required
        value={stationId}
        data={[{ value: '', label: 'Choose one' }, ...stations.map(({ id, name }) => ({ value: id, label: name }))]}
        onChange={(event) => change({ stationId: event.currentTarget.value })}
      />
      <NativeSelect
        label="Band"
        required
        disabled={bands.length === 0}
        value={band ?? ''}
        error={problem?.fieldError('band')}
        data={bands.map((each) => ({ value: each, label: each }))}
        onChange={(event) => change({ band: event.currentTarget.value })}
      />
      <div className={classes.dates}>
        <TextInput
          type="date"
          label="From"
          description="00:00 UTC"
          required
          value={draft.from}
          onChange={(event) => change({ from: event.currentTarget.value })}
        />
        <TextInput
          type="date"
          label="To"
          description="00:00 UTC, as long as the licence"
          required
          value={draft.to}
          error={problem?.fieldError('validToUtc')}
          onChange={(event) => change({ to: event.currentTarget.value })}
        />
      </div>
      <Textarea
        label="What is transmitted"
        description="Commands, time updates, software; power and bandwidth as the licence has them."
        required
        autosize
        minRows={2}
        maxLength={2_000}
        value={draft.purpose}
        onChange={(event) => change({ purpose: event.currentTarget.value })}
      />
      <FileDrop
        label="Papers"
        hint="The licence and the coordination for this station."
        files={files}
        onChange={setFiles}
      />
      <Button type="submit" size="md" loading={ask.isPending} disabled={files.length === 0 || !band}>
        {files.length === 0 ? 'Asking waits for the papers' : 'Ask the station'}
      </Button>
    </Paper>
  );
}

function useAsk() {
  const client = useQueryClient();
  const navigate = useNavigate();
  return useMutation({
    mutationFn: ({ draft, band, fileIds }: { draft: Draft; band: Band; fileIds: string[] }) =>
      call(routes.requestClearance, {
        body: {
          spacecraftId: draft.spacecraftId,
          stationId: draft.stationId,
          band,
          validFromUtc: `${draft.from}T00:00:00Z`,
          validToUtc: `${draft.to}T00:00:00Z`,
          purpose: draft.purpose,
          fileIds,
        },
      }),
    onSuccess: (clearance) => {
      clearanceMoved(client, clearance);
      void navigate(paths.clearance(clearance.id));
    },
  });
}
