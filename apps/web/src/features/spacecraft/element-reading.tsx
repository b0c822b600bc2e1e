/** What was found in the text: good sets and what saving does with them, then everything that is wrong. */
import { Pagination, Table } from '@mantine/core';
import type { ElementFault, ReadElement } from '@skyberth/shared';
import { type ReactNode, useState } from 'react';
import { useIsPhone } from '../../lib/use-phone.js';
import { DayTime } from '../../ui/day-time.js';
import { Sign, type SignShape } from '../../ui/signs.js';
import { ageWords, fateWords } from './element-words.js';
import elementClasses from './elements.module.css';
import { goodWords, ownSentence } from './reading-words.js';
import classes from './spacecraft.module.css';

interface ReadingProps {
  readonly good: readonly ReadElement[];
  readonly faults: readonly ElementFault[];
  readonly onShowLine: (line: number) => void;
}

export function ElementReading({ good, faults, onShowLine }: ReadingProps) {
  const isPhone = useIsPhone();
  const [Faults, Good] = isPhone ? [FaultList, GoodList] : [FaultTable, GoodTable];
  return (
    <>
      {faults.length > 0 && (
        <section aria-labelledby="faults" className={elementClasses.found}>
          <h2 id="faults" className={classes.heading}>
            {faults.length} {faults.length === 1 ? 'thing is' : 'things are'} wrong
          </h2>
          <Faults faults={faults} onShowLine={onShowLine} />
        </section>
      )}
      {good.length > 0 && (
        <section aria-labelledby="good" className={elementClasses.found}>
          <h2 id="good" className={classes.heading}>
            {goodWords(good)}
          </h2>
          <Good good={good} onShowLine={onShowLine} />
        </section>
      )}
    </>
  );
}

const FATE_SIGNS: Readonly<Record<ReadElement['fate'], SignShape>> = {
  new: 'check',
  'new-spacecraft': 'check',
  older: 'half',
  duplicate: 'dashed',
};

function Fate({ each }: { readonly each: ReadElement }) {
  return (
    <span className={elementClasses.fate} data-fate={each.fate}>
      <Sign shape={FATE_SIGNS[each.fate]} sizePx={12} />
      {fateWords(each)}
    </span>
  );
}

function GoodList({ good, onShowLine }: Pick<ReadingProps, 'good' | 'onShowLine'>) {
  return (
    <InPages items={good}>
      {(shown) => (
        <ul className={elementClasses.readList}>
          {shown.map((each) => (
            <li key={`${each.line} ${each.catalogNumber} ${each.epochUtc}`}>
              <LineButton line={each.line} onShowLine={onShowLine} />
              <div>
                <strong>{each.objectName}</strong>
                <div className={classes.quiet}>
                  <DayTime atMs={Date.parse(each.epochUtc)} />, {ageWords(each.ageH)}
                </div>
                <Fate each={each} />
              </div>
            </li>
          ))}
        </ul>
      )}
    </InPages>
  );
}

function GoodTable({ good, onShowLine }: Pick<ReadingProps, 'good' | 'onShowLine'>) {
  return (
    <InPages items={good}>
      {(shown) => (
        <Table>
          <Table.Thead>
            <Table.Tr>
              <Table.Th>Line</Table.Th>
              <Table.Th>Object</Table.Th>
              <Table.Th>Epoch, UTC</Table.Th>
              <Table.Th>Saving it</Table.Th>
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {shown.map((each) => (
              <Table.Tr key={`${each.line} ${each.catalogNumber} ${each.epochUtc}`}>
                <Table.Td>
                  <LineButton line={each.line} onShowLine={onShowLine} />
                </Table.Td>
                <Table.Td>
                  <strong>{each.objectName}</strong>
                  <div className={classes.quiet}>
                    {[each.catalogNumber > 0 ? each.catalogNumber : null, each.objectId].filter(Boolean).join(', ')}
                  </div>
                </Table.Td>
                <Table.Td>
                  <DayTime atMs={Date.parse(each.epochUtc)} />
                  <div className={classes.quiet}>{ageWords(each.ageH)}</div>
                </Table.Td>
                <Table.Td>
                  <Fate each={each} />
                </Table.Td>
              </Table.Tr>
            ))}
          </Table.Tbody>
        </Table>
      )}
    </InPages>
  );
}

function OwnSentence({ fault }: { readonly fault: ElementFault }) {
  const sentence = ownSentence(fault);
  return sentence && <div className={classes.quiet}>{sentence}</div>;
}

function FaultList({ faults, onShowLine }: Pick<ReadingProps, 'faults' | 'onShowLine'>) {
  return (
    <InPages items={faults}>
      {(shown) => (
        <ul className={elementClasses.readList}>
          {shown.map((fault) => (
            <li key={`${fault.line} ${fault.field} ${fault.message}`}>
              <LineButton line={fault.line} onShowLine={onShowLine} />
              <div>
                <strong>{fault.field}</strong>
                <OwnSentence fault={fault} />
                <div>
                  Found {fault.found ? <code className={elementClasses.code}>{fault.found}</code> : 'nothing'}, expected{' '}
                  {fault.expected}
                </div>
              </div>
            </li>
          ))}
        </ul>
      )}
    </InPages>
  );
}

function FaultTable({ faults, onShowLine }: Pick<ReadingProps, 'faults' | 'onShowLine'>) {
  return (
    <InPages items={faults}>
      {(shown) => (
        <Table>
          <Table.Thead>
            <Table.Tr>
              <Table.Th>Line</Table.Th>
              <Table.Th>Field</Table.Th>
              <Table.Th>Found</Table.Th>
              <Table.Th>Expected</Table.Th>
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {shown.map((fault) => (
              <Table.Tr key={`${fault.line} ${fault.field} ${fault.message}`}>
                <Table.Td>
                  <LineButton line={fault.line} onShowLine={onShowLine} />
                </Table.Td>
                <Table.Td>
                  <strong>{fault.field}</strong>
                </Table.Td>
                <Table.Td>
                  {fault.found ? (
                    <code className={elementClasses.code}>{fault.found}</code>
                  ) : (
                    <span className={classes.quiet}>nothing</span>
                  )}
                </Table.Td>
                <Table.Td>
                  {fault.expected}
                  <OwnSentence fault={fault} />
                </Table.Td>
              </Table.Tr>
            ))}
          </Table.Tbody>
        </Table>
      )}
    </InPages>
  );
}

function LineButton({ line, onShowLine }: { readonly line: number; readonly onShowLine: (line: number) => void }) {
  return (
    <button
      type="button"
      className={elementClasses.lineButton}
      onClick={() => onShowLine(line)}
      aria-label={`Show line ${line}`}
    >
      {line}
    </button>
  );
}

const PER_PAGE = 50;

interface InPagesProps<T> {
  readonly items: readonly T[];
  readonly children: (shown: readonly T[]) => ReactNode;
}

function InPages<T>({ items, children }: InPagesProps<T>) {
  const [wanted, setPage] = useState(1);
  const pages = Math.ceil(items.length / PER_PAGE);
  const page = Math.min(wanted, pages);
  return (
    <>
      <div className={classes.scroll}>{children(items.slice((page - 1) * PER_PAGE, page * PER_PAGE))}</div>
      {pages > 1 && <Pagination total={pages} value={page} onChange={setPage} mt="md" size="sm" withEdges />}
    </>
  );
}
