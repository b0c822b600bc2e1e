/** One dispute on one page: geometry, both sides and the money on one scale of time, and the decision below. */
import { Anchor, Skeleton } from '@mantine/core';
import type { Dispute } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import { EvidenceGeometry } from '../../drawing/evidence/evidence-geometry.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useIsPhone } from '../../lib/use-phone.js';
import { useTitle } from '../../lib/use-title.js';
import { DayTime } from '../../ui/day-time.js';
import { formatBytes, formatDay, formatDuration, formatHourMinute, formatTime } from '../../ui/format.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Sign } from '../../ui/signs.js';
import { StateBadge } from '../../ui/state-badge.js';
import { Figure, Figures, MoneyText } from '../../ui/values.js';
import { AppealForm } from './appeal-form.js';
import { DecisionDesk } from './decision-desk.js';
import { Decisions } from './decisions.js';
import { disputeQueries } from './dispute-queries.js';
import { disputeTitle, observed, REASON_WORDS, STATE_BADGES, stationLog } from './dispute-words.js';
import classes from './disputes.module.css';
import { SideLog } from './side-log.js';
import { Statements } from './statements.js';

const HEIGHT_PX = 430;
const WEIGHT_SIGNS = { clear: 'circle', fault: 'square', neutral: 'diamond' } as const;
const WEIGHT_WORDS = { clear: 'speaks against a fault', fault: 'points to a fault', neutral: 'neutral' } as const;

export function DisputePage() {
  const { id = '' } = useParams();
  const { data, error, refetch } = useQuery(disputeQueries.one(id));
  useTitle(data ? `Dispute ${data.number}` : 'Dispute');
  if (error && !data)
    return (
      <ProblemNotice title="The dispute could not be read" onRetry={() => void refetch()}>
        {sentenceOf(error)}
      </ProblemNotice>
    );
  if (!data) return <Skeleton height={600} aria-label="Loading the dispute" />;
  return <OneDispute dispute={data} />;
}

function OneDispute({ dispute }: { readonly dispute: Dispute }) {
  const badge = STATE_BADGES[dispute.state];
  const waits = dispute.state === 'open' || dispute.state === 'appealed';
  return (
    <>
      <PageTitle
        title={disputeTitle(dispute)}
        badge={
          <StateBadge tone={badge.tone}>
            {waits ? `${badge.words}, by ${shortDay(dispute.decideByUtc)}` : badge.words}
          </StateBadge>
        }
        actions={
          dispute.gapS !== null && (
            <Figures columns={1}>
              <Figure label="Without data for" value={formatDuration(dispute.gapS * 1000)} size="large" tone="bad" />
            </Figures>
          )
        }
      >
        <Anchor component={Link} to={paths.booking(dispute.bookingId)}>
          Berth {dispute.bookingNumber}
        </Anchor>{' '}
        on {formatDay(Date.parse(dispute.aosUtc))}. {dispute.operatorName} says: {REASON_WORDS[dispute.reason]}. Opened{' '}
        <DayTime atMs={Date.parse(dispute.openedUtc)} />, inside 14 days. {dispute.ownerName} was asked to answer by{' '}
        <DayTime atMs={Date.parse(dispute.statementDueUtc)} />.
      </PageTitle>
      <Evidence dispute={dispute} />
      {dispute.actions.includes('decide') && <DecisionDesk dispute={dispute} />}
      {dispute.actions.includes('ask') && !dispute.actions.includes('decide') && (
        <p className={classes.quiet}>You made the first decision; another admin decides the appeal.</p>
      )}
      <div className={classes.below}>
        <Statements dispute={dispute} />
        <div className={classes.stack}>
          <Decisions dispute={dispute} />
          {dispute.actions.includes('appeal') && <AppealForm dispute={dispute} />}
        </div>
      </div>
    </>
  );
}

const shortDay = (utc: string): string => `${formatDay(Date.parse(utc)).slice(5)} ${formatHourMinute(Date.parse(utc))}`;

function Evidence({ dispute }: { readonly dispute: Dispute }) {
  const { evidence } = dispute;
  const isPhone = useIsPhone();
  const [aosMs, losMs] = [Date.parse(evidence.aosUtc), Date.parse(evidence.losUtc)];
  const gap = evidence.gap && { fromMs: Date.parse(evidence.gap.fromUtc), toMs: Date.parse(evidence.gap.toUtc) };
  const shared = { aosMs, losMs, gap, heightPx: isPhone ? 360 : HEIGHT_PX };
  const track = evidence.track.map(({ timeUtc, ...point }) => ({ atMs: Date.parse(timeUtc), ...point }));
  return (
    <div className={classes.evidence}>
      <section aria-label="Geometry">
        <h2>Geometry</h2>
        <p className={classes.by}>elevation over the mask, and link margin</p>
        <EvidenceGeometry {...shared} track={track} label={`Geometry of ${disputeTitle(dispute)}`} />
        <p className={classes.by}>{laterWords(dispute)}</p>
      </section>
      <SideLog
        {...shared}
        title="The station said"
        by={`${dispute.ownerName}, live and by hand`}
        entries={stationLog(dispute)}
      />
      <SideLog
        {...shared}
        title="The operator said"
        by={`${dispute.operatorName}, from its own log`}
        entries={observed(dispute, 'operator')}
      />
      <div>
        {dispute.money.length > 0 && <MoneySoFar dispute={dispute} />}
        <section className={dispute.money.length > 0 ? classes.second : undefined} aria-labelledby="found">
          <h2 id="found">What the system found</h2>
          <ul className={classes.findings}>
            {evidence.findings.map((finding) => (
              <li key={finding.title + finding.words} data-weight={finding.weight}>
                <Sign shape={WEIGHT_SIGNS[finding.weight]} sizePx={15} />
                <span>
                  <span className="sk-hidden">{WEIGHT_WORDS[finding.weight]}: </span>
                  <strong>{finding.title}</strong> {finding.words}
                </span>
              </li>
            ))}
          </ul>
          <p className={classes.by}>
            Assembled <DayTime atMs={Date.parse(evidence.assembledUtc)} />.{' '}
            {evidence.gap ? `The time without data is by ${evidence.gap.from}. ` : ''}
            {evidence.predictedBytes !== null && `Predicted ${formatBytes(evidence.predictedBytes)}, `}
            {evidence.reportedBytes === null
              ? 'no volume reported.'
              : `reported ${formatBytes(evidence.reportedBytes)}.`}{' '}
            {evidence.mails.length} mails were sent about it.
          </p>
        </section>
      </div>
    </div>
  );
}

function laterWords({ evidence }: Dispute): string {
  const { later } = evidence;
  if (later === null)
    return `By the elements it was sold on, ${formatDuration(evidence.elements.ageH * 3_600_000)} old.`;
  if (later.aosShiftS === null || later.losShiftS === null) return 'Later elements do not find this pass.';
  return `Later, better elements move AOS by ${later.aosShiftS.toFixed(1)} s and LOS by ${later.losShiftS.toFixed(1)} s.`;
}

function MoneySoFar({ dispute }: { readonly dispute: Dispute }) {
  return (
    <section aria-labelledby="money-so-far">
      <h2 id="money-so-far">Money so far</h2>
      <table className={classes.money}>
        <tbody>
          {dispute.money.map((line) => {
            const atMs = Date.parse(line.atUtc);
            return (
              <tr key={line.atUtc + line.words}>
                <td>
                  <time dateTime={line.atUtc} title={`${formatDay(atMs)} ${formatTime(atMs)} UTC`}>
                    {shortDay(line.atUtc)}
                  </time>
                </td>
                <td>{line.words.replace(`Berth ${dispute.bookingNumber}: `, '')}</td>
                <td>
                  <MoneyText amountMinor={line.amountMinor} currency={dispute.currency} />
                </td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </section>
  );
}
