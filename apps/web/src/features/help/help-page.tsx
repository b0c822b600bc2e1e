/** Help: what to do here, step by step, the words of the trade, and the keys. */
import { Anchor, TextInput } from '@mantine/core';
import { Link, useSearchParams } from 'react-router-dom';
import { useSession } from '../../lib/session.js';
import { useTitle } from '../../lib/use-title.js';
import { Caution } from '../../ui/caution.js';
import { PageTitle } from '../../ui/page-title.js';
import { TERMS } from '../../ui/terms.js';
import { guidesFor } from './guides.js';
import classes from './help.module.css';

const KEYS = [
  ['Ctrl or ⌘ with K', 'go to any page, spacecraft, station or booking'],
  ['Arrow keys on the board', 'from pass to pass, and from row to row'],
  ['Space on the board', 'pick the pass'],
  ['Enter on the board', 'open the pass'],
  ['Plus and minus on the board', 'closer and wider'],
  ['Page up and page down on the board', 'earlier and later'],
  ['Esc', 'close what is open'],
] as const;

export function HelpPage() {
  useTitle('Help');
  const { active } = useSession();
  const [search, setSearch] = useSearchParams();
  const wanted = search.get('word') ?? '';
  const terms = Object.entries(TERMS).filter(([, term]) =>
    `${term.word} ${'long' in term ? term.long : ''} ${term.meaning}`.toLowerCase().includes(wanted.toLowerCase()),
  );
  return (
    <>
      <PageTitle title="Help">What to do here, and what the words mean.</PageTitle>
      <div className={classes.columns}>
        <div className={classes.stack}>
          {guidesFor(active).map((guide) => (
            <section key={guide.title}>
              <h2>{guide.title}</h2>
              <ol className={classes.steps}>
                {guide.steps.map(({ words, to }) => (
                  <li key={words}>
                    {to ? (
                      <Anchor component={Link} to={to}>
                        {words}
                      </Anchor>
                    ) : (
                      words
                    )}
                  </li>
                ))}
              </ol>
            </section>
          ))}
          <section>
            <h2>Keys</h2>
            <dl className={classes.keys}>
              {KEYS.map(([keys, what]) => (
                <div key={keys}>
                  <dt>{keys}</dt>
                  <dd>{what}</dd>
                </div>
              ))}
            </dl>
          </section>
          <Caution title="Skyberth computes and books. It grants no right to transmit.">
            <p>
              Transmitting without licence and coordination is unlawful and can harm others. Power near a feed is a
              radiation hazard, a dish moves without warning, and the Sun can damage a receiver. The licence, local
              rules and licensed practitioners decide; interlocks stay in place.
            </p>
          </Caution>
        </div>
        <section>
          <h2>Words of the trade</h2>
          <TextInput
            type="search"
            label="Find a word"
            value={wanted}
            onChange={(event) =>
              setSearch(event.currentTarget.value ? { word: event.currentTarget.value } : {}, { replace: true })
            }
          />
          {terms.length === 0 && <p role="status">No word here has that in it.</p>}
          <dl className={classes.terms}>
            {terms.map(([name, term]) => (
              <div key={name} id={name}>
                <dt>
                  {term.word}
                  {'long' in term && <span className={classes.long}>, {term.long}</span>}
                </dt>
                <dd>{term.meaning}</dd>
              </div>
            ))}
          </dl>
        </section>
      </div>
    </>
  );
}
