import { Button, NumberInput, SegmentedControl, Select, Textarea, TextInput } from '@mantine/core';
import { useForm } from '@mantine/form';
import type { Booking } from '@skyberth/shared';
import { fieldErrors, sentenceOf } from '../../lib/problem-fields.js';
import { useLeaveGuard } from '../../lib/use-leave-guard.js';
import { DayTime } from '../../ui/day-time.js';
import { formatBytes, formatMoney, formatNumber } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Figure, Figures } from '../../ui/values.js';
import { useReport } from './booking-mutations.js';
import classes from './contact.module.css';
import { contactReport, EMPTY_REPORT, type ReportValues, reportFaults } from './report-form.js';

/** The report once it is there; before that its form for the station, from when it may be given. */
export function ReportSection({ booking }: { readonly booking: Booking }) {
  if (booking.report) return <Report booking={booking} report={booking.report} />;
  if (booking.actions.includes('report')) return <ReportForm booking={booking} />;
  return null;
}

function Report({ booking, report }: { booking: Booking; report: NonNullable<Booking['report']> }) {
  return (
    <section className={classes.box} aria-labelledby="report-title">
      <h2 id="report-title" className={classes.heading}>
        The station’s report: {report.outcome}
      </h2>
      <Figures columns={2}>
        <Figure label="Acquired" value={<InstantOrNot utc={report.acquiredUtc} />} />
        <Figure label="Lost" value={<InstantOrNot utc={report.lostUtc} />} />
        <Figure
          label="Received"
          value={report.receivedBytes === null ? 'not told' : formatBytes(report.receivedBytes)}
        />
        <Figure label="Eb/N0" value={report.ebN0Db === null ? 'not told' : `${formatNumber(report.ebN0Db, 1)} dB`} />
        {report.cause !== 'none' && <Figure label="Cause" value={report.cause} />}
      </Figures>
      {report.note && (
        <p>
          {booking.ownerName}: {report.note}
        </p>
      )}
    </section>
  );
}

const InstantOrNot = ({ utc }: { utc: string | null }) =>
  utc ? <DayTime atMs={Date.parse(utc)} show="time" /> : 'not told';

const OUTCOMES = ['good', 'degraded', 'failed'].map((value) => ({
  value,
  label: `${value[0]?.toUpperCase()}${value.slice(1)}`,
}));
const CAUSES = ['none', 'station', 'spacecraft', 'weather', 'interference', 'unknown'];

function ReportForm({ booking }: { readonly booking: Booking }) {
  const report = useReport(booking.id);
  const form = useForm<ReportValues>({
    initialValues: booking.state === 'under way' ? { ...EMPTY_REPORT, outcome: 'failed' } : EMPTY_REPORT,
    validate: reportFaults,
  });
  useLeaveGuard(form.isDirty() && !report.isSuccess, 'the report');
  const send = form.onSubmit((values) =>
    report.mutate(contactReport(values, booking), { onError: (error) => form.setErrors(fieldErrors(error)) }),
  );
  const { outcome } = form.values;
  const price = formatMoney({ amountMinor: booking.toPayMinor, currency: booking.currency });
  const isRunning = booking.state === 'under way';
  return (
    <form className={classes.box} onSubmit={send} noValidate aria-labelledby="report-title">
      <h2 id="report-title" className={classes.heading}>
        {isRunning ? 'Break off and report' : 'Report the contact'}
      </h2>
      {isRunning && <p>Until LOS only a contact that failed can be reported; this ends it now.</p>}
      {report.error && <ProblemNotice title="The report was not sent">{sentenceOf(report.error)}</ProblemNotice>}
      {!isRunning && <SegmentedControl aria-label="How it went" data={OUTCOMES} {...form.getInputProps('outcome')} />}
      {outcome !== 'good' && (
        <Select label="Cause" data={CAUSES} allowDeselect={false} {...form.getInputProps('cause')} />
      )}
      <div className={classes.fields}>
        <TextInput
          label="Acquired at, UTC"
          placeholder={booking.aosUtc.slice(11, 19)}
          {...form.getInputProps('acquired')}
        />
        <TextInput label="Lost at, UTC" placeholder={booking.losUtc.slice(11, 19)} {...form.getInputProps('lost')} />
        <NumberInput label="Received" min={0} {...form.getInputProps('received')} />
        <Select label="Unit" data={['kB', 'MB', 'GB']} allowDeselect={false} {...form.getInputProps('receivedUnit')} />
        <NumberInput label="Eb/N0, dB" decimalScale={2} {...form.getInputProps('ebN0Db')} />
      </div>
      <Textarea
        label="Note; the buyer reads it"
        autosize
        minRows={2}
        maxLength={2000}
        {...form.getInputProps('note')}
      />
      <Button type="submit" size="md" loading={report.isPending}>
        {outcome === 'failed' ? 'Report it as failed' : `Report it and settle ${price}`}
      </Button>
      <p className={classes.small}>
        {outcome === 'failed'
          ? 'What is charged or given back follows from the cause.'
          : `Takes ${price} from the buyer and issues the invoice. A report cannot be taken back.`}
      </p>
    </form>
  );
}
