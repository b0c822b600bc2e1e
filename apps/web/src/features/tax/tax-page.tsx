/** Tax and fees: what invoices are made from, and a question about one customer. */
import { Paper, Skeleton, Table, TextInput } from '@mantine/core';
import { type ResponseOf, routes } from '@skyberth/shared';
import { queryOptions, useQuery } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useTitle } from '../../lib/use-title.js';
import { formatNumber } from '../../ui/format.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Figure, Figures } from '../../ui/values.js';
import classes from './tax.module.css';
import { rateText, readQuestion, stepsText } from './tax-words.js';

type TaxTable = ResponseOf<typeof routes.taxTable>;

const taxQueries = {
  table: () => queryOptions({ queryKey: ['tax', 'table'], queryFn: ({ signal }) => call(routes.taxTable, { signal }) }),
  treatment: (question: { country: string; vatNumber: string | undefined; day: string }) =>
    queryOptions({
      queryKey: ['tax', 'treatment', question],
      queryFn: ({ signal }) => call(routes.taxTreatment, { query: question, signal }),
      retry: false,
    }),
};

export function TaxPage() {
  useTitle('Tax and fees');
  const table = useQuery(taxQueries.table());
  return (
    <>
      <PageTitle title="Tax and fees">
        Rates are data by country and day; an invoice keeps the rate of its day. Check them with the tax office of each
        country before you rely on them.
      </PageTitle>
      {table.error && (
        <ProblemNotice title="The tables could not be read" onRetry={() => void table.refetch()}>
          {sentenceOf(table.error)}
        </ProblemNotice>
      )}
      {table.isPending && <Skeleton height={300} />}
      {table.data && (
        <div className={classes.columns}>
          <div className={classes.stack}>
            <Seller table={table.data} />
            <Question />
          </div>
          <Rates rates={table.data.rates} />
          <Numbers table={table.data} />
        </div>
      )}
    </>
  );
}

function Seller({ table }: { readonly table: TaxTable }) {
  const { seller, feeBasisPoints, rounding } = table;
  return (
    <Paper component="section" withBorder className={classes.card} aria-label="The seller and its fee">
      <h2>{seller.name}</h2>
      <Figures columns={2}>
        <Figure label="Taxed in" value={seller.country} note={seller.vatNumber ?? 'no VAT number'} />
        <Figure label="Fee on a contact’s net price" value={rateText(feeBasisPoints)} />
      </Figures>
      <p className={classes.small}>{rounding}</p>
    </Paper>
  );
}

/** What an invoice to such a customer would bear; the question stands in the address. */
function Question() {
  const [search, setSearch] = useSearchParams();
  const question = readQuestion(search, new Date().toISOString().slice(0, 10));
  const answer = useQuery({ ...taxQueries.treatment(question), enabled: question.country !== '' });
  const change = (name: string, value: string) => {
    const next = new URLSearchParams(search);
    if (value === '') next.delete(name);
    else next.set(name, value);
    setSearch(next, { replace: true });
  };
  return (
    <Paper component="section" withBorder className={classes.card} aria-labelledby="question-title">
      <h2 id="question-title">What would a customer be charged?</h2>
      <div className={classes.form}>
        <TextInput
          label="Country, two letters"
          maxLength={2}
          value={search.get('country') ?? ''}
          onChange={(event) => change('country', event.currentTarget.value.toUpperCase())}
        />
        <TextInput
          label="VAT number"
          maxLength={40}
          value={search.get('vatNumber') ?? ''}
          onChange={(event) => change('vatNumber', event.currentTarget.value)}
        />
        <TextInput
          label="Day of the contact"
          type="date"
          value={question.day}
          onChange={(event) => change('day', event.currentTarget.value)}
        />
      </div>
      <div aria-live="polite">
        {answer.error && <ProblemNotice title="There is no answer">{sentenceOf(answer.error)}</ProblemNotice>}
        {answer.data && (
          <>
            <Figures columns={2}>
              <Figure label="Treatment" value={answer.data.kind} />
              <Figure label="VAT" value={rateText(answer.data.rateBasisPoints)} note={answer.data.taxCountry ?? ''} />
            </Figures>
            {answer.data.invoiceText && <p>On the invoice: “{answer.data.invoiceText}”</p>}
            {answer.data.vatNumber && <p className={classes.small}>{answer.data.vatNumber.sentence}</p>}
            {answer.data.caution && <p className={classes.caution}>{answer.data.caution}</p>}
          </>
        )}
      </div>
    </Paper>
  );
}

function Rates({ rates }: { readonly rates: TaxTable['rates'] }) {
  return (
    <Paper component="section" withBorder className={classes.card} aria-label="Standard VAT rates">
      <h2>Standard VAT rates</h2>
      <Table>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Country</Table.Th>
            <Table.Th>Rate, and from which day</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {rates.map((rate) => (
            <Table.Tr key={rate.country}>
              <Table.Td>{rate.country}</Table.Td>
              <Table.Td>{stepsText(rate.steps)}</Table.Td>
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
    </Paper>
  );
}

function Numbers({ table }: { readonly table: TaxTable }) {
  const odd = table.currencies.filter((currency) => currency.decimals !== 2);
  return (
    <div className={classes.stack}>
      <Paper component="section" withBorder className={classes.card} aria-label="VAT numbers">
        <h2>VAT numbers</h2>
        <Table>
          <Table.Thead>
            <Table.Tr>
              <Table.Th>Form</Table.Th>
              <Table.Th>Check digits</Table.Th>
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {table.vatNumbers.map((number) => (
              <Table.Tr key={number.prefix}>
                <Table.Td>{number.form}</Table.Td>
                <Table.Td>{number.checksDigits ? 'checked' : 'form only'}</Table.Td>
              </Table.Tr>
            ))}
          </Table.Tbody>
        </Table>
      </Paper>
      <Paper component="section" withBorder className={classes.card} aria-label="Minor units">
        <h2>Minor units</h2>
        <p className={classes.small}>
          {formatNumber(table.currencies.length)} currencies of ISO 4217; all have two decimals but these:
        </p>
        <p>{odd.map((one) => `${one.currency} ${one.decimals}`).join(', ')}</p>
      </Paper>
    </div>
  );
}
