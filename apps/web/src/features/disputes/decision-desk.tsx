/** The decision: how much goes back, who bears it, why, and exactly what will be booked, before the button. */
import { Button, NumberInput, Radio, Select, Textarea } from '@mantine/core';
import { useDebouncedValue } from '@mantine/hooks';
import { notifications } from '@mantine/notifications';
import { type BorneBy, type DecisionTerms, type Dispute, type DisputeOutcome, routes } from '@skyberth/shared';
import { keepPreviousData, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useLeaveGuard } from '../../lib/use-leave-guard.js';
import { formatMoney } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { MoneyText } from '../../ui/values.js';
import { disputeQueries } from './dispute-queries.js';
import { shareText } from './dispute-words.js';
import classes from './disputes.module.css';
import { Precedents } from './precedents.js';

const BEARERS = [
  { value: 'owner', label: 'the station' },
  { value: 'marketplace', label: 'the marketplace' },
];
const SETTLE_MS = 250;

export function DecisionDesk({ dispute }: { readonly dispute: Dispute }) {
  const client = useQueryClient();
  const [outcome, setOutcome] = useState<DisputeOutcome | null>(null);
  const [percent, setPercent] = useState<number | ''>((dispute.suggestedBasisPoints ?? 5_000) / 100);
  const [borneBy, setBorneBy] = useState<BorneBy>('owner');
  const [text, setText] = useState('');
  useLeaveGuard(text.trim() !== '', 'your decision');
  const terms = outcome && termsOf(outcome, percent, borneBy);
  const [settled] = useDebouncedValue(terms ? JSON.stringify(terms) : null, SETTLE_MS);
  const effect = useQuery({
    queryKey: ['disputes', 'preview', dispute.id, settled],
    queryFn: ({ signal }) =>
      call(routes.previewDecision, { params: { id: dispute.id }, body: JSON.parse(settled ?? ''), signal }),
    enabled: settled !== null,
    placeholderData: keepPreviousData,
  });
  const decide = useMutation({
    mutationFn: (body: { terms: DecisionTerms; expectedRefundMinor: number }) =>
      call(routes.decideDispute, { params: { id: dispute.id }, body: { ...body, text: text.trim() } }),
    onSuccess: (next) => {
      setText('');
      client.setQueryData(disputeQueries.one(dispute.id).queryKey, next);
      void client.invalidateQueries({ queryKey: ['disputes', 'list'] });
      void client.invalidateQueries({ queryKey: ['home'] });
      notifications.show({ message: `Dispute ${dispute.number} is decided.` });
    },
  });
  const isFresh = terms !== null && settled === JSON.stringify(terms) && !effect.isPlaceholderData;
  const refund = effect.data && formatMoney({ amountMinor: effect.data.refundMinor, currency: dispute.currency });
  return (
    <section className={classes.desk} aria-labelledby="decision-title">
      <h2 id="decision-title">{dispute.decisions.length === 0 ? 'Your decision' : 'Your decision on the appeal'}</h2>
      {decide.error && <ProblemNotice title="Nothing was decided">{sentenceOf(decide.error)}</ProblemNotice>}
      <div className={classes.deskColumns}>
        <div className={classes.stack}>
          <Radio.Group
            label="How much goes back to the operator"
            value={outcome}
            onChange={(value) => setOutcome(value as DisputeOutcome)}
          >
            <div className={classes.stack} style={{ marginTop: 8 }}>
              <Radio value="none" label="None: the station keeps all" />
              <Radio
                value="part"
                label={
                  dispute.suggestedBasisPoints === null
                    ? 'Part of it'
                    : `Part: the time without data is ${shareText(dispute.suggestedBasisPoints)} of the contact`
                }
              />
              <Radio value="full" label="Full: as if it had never been sold" />
            </div>
          </Radio.Group>
          {outcome === 'part' && (
            <NumberInput
              label="Share of the price"
              suffix=" %"
              min={0.01}
              max={99.99}
              decimalScale={2}
              value={percent}
              onChange={(value) => setPercent(typeof value === 'number' ? value : '')}
              w={180}
            />
          )}
          {outcome !== null && outcome !== 'none' && (
            <Select
              label="Borne by"
              data={BEARERS}
              value={borneBy}
              allowDeselect={false}
              onChange={(value) => setBorneBy(value === 'marketplace' ? 'marketplace' : 'owner')}
              w={220}
            />
          )}
          <Textarea
            label="Reasons, read by both sides"
            required
            autosize
            minRows={3}
            maxLength={4_000}
            value={text}
            onChange={(event) => setText(event.currentTarget.value)}
          />
        </div>
        <div aria-live="polite">
          <h2>What will be booked</h2>
          {outcome === null && <p className={classes.by}>Choose how much goes back.</p>}
          {effect.error && <ProblemNotice title="This can't be booked">{sentenceOf(effect.error)}</ProblemNotice>}
          {outcome !== null && effect.data && (
            <table className={classes.money}>
              <tbody>
                {effect.data.lines.map((line) => (
                  <tr key={line.words}>
                    <td style={{ whiteSpace: 'normal', color: 'inherit' }}>{line.words}</td>
                    <td>
                      <MoneyText amountMinor={line.amountMinor} currency={dispute.currency} />
                    </td>
                  </tr>
                ))}
              </tbody>
            </table>
          )}
          <p className={classes.by}>
            A credit note where money goes back, the mails and the audit entry follow by themselves.
          </p>
        </div>
        <div className={classes.stack}>
          <Button
            disabled={!terms || !isFresh || !effect.data || text.trim() === ''}
            loading={decide.isPending}
            onClick={() =>
              terms && effect.data && decide.mutate({ terms, expectedRefundMinor: effect.data.refundMinor })
            }
          >
            {terms && refund && isFresh ? (effect.data?.refundMinor ? `Refund ${refund}` : 'Refund nothing') : 'Decide'}
          </Button>
          <p className={classes.by}>
            {dispute.decisions.length === 0
              ? 'Booked at once. Either side may appeal once, within 14 days, to another admin.'
              : 'Booked at once, and final. What was given back is not asked back from the operator.'}
          </p>
          <Precedents reason={dispute.reason} />
        </div>
      </div>
    </section>
  );
}

function termsOf(outcome: DisputeOutcome, percent: number | '', borneBy: BorneBy): DecisionTerms | null {
  if (outcome === 'none') return { outcome, refundBasisPoints: 0, borneBy };
  if (outcome === 'full') return { outcome, refundBasisPoints: 10_000, borneBy };
  const refundBasisPoints = percent === '' ? 0 : Math.round(percent * 100);
  return refundBasisPoints > 0 && refundBasisPoints < 10_000 ? { outcome, refundBasisPoints, borneBy } : null;
}
