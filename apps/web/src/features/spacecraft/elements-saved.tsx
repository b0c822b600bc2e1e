/** After saving: what was kept, where it went, and what comes next. */
import { Anchor, Button, Paper } from '@mantine/core';
import type { ResponseOf, routes } from '@skyberth/shared';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { StateBadge } from '../../ui/state-badge.js';
import elementClasses from './elements.module.css';
import { savedWords } from './reading-words.js';
import classes from './spacecraft.module.css';

interface ElementsSavedProps {
  readonly result: ResponseOf<typeof routes.saveElements>;
  readonly onAgain: () => void;
}

const MOST_NAMES = 100;

export function ElementsSaved({ result, onAgain }: ElementsSavedProps) {
  const { spacecraft, faults } = result;
  const added = spacecraft.filter((one) => one.added).length;
  const rest = spacecraft.length - MOST_NAMES;
  return (
    <Paper withBorder className={classes.card} role="status">
      <h2 className={classes.heading}>{savedWords(result)}</h2>
      {faults.length > 0 && <div>{faults.length} faulty or unknown parts were left out.</div>}
      <ul className={elementClasses.savedList}>
        {spacecraft.slice(0, MOST_NAMES).map((one) => (
          <li key={one.id}>
            <Anchor component={Link} to={paths.oneSpacecraft(one.id)}>
              {one.name}
            </Anchor>
            {one.added && <StateBadge tone="good">Added</StateBadge>}
          </li>
        ))}
      </ul>
      {rest > 0 && <div className={classes.quiet}>and {rest} more</div>}
      {added > 0 && <div>An added spacecraft has no radio yet; passes can be bought for it once it has one.</div>}
      <div className={classes.acts}>
        <Button component={Link} to={paths.findTime}>
          Find time
        </Button>
        <Button variant="default" onClick={onAgain}>
          Give more elements
        </Button>
        <Anchor component={Link} to={paths.spacecraft}>
          All spacecraft
        </Anchor>
      </div>
    </Paper>
  );
}
