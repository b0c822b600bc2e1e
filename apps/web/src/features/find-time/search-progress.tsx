import { Button, Progress } from '@mantine/core';
import { useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { formatNumber } from '../../ui/format.js';
import classes from './find-time.module.css';
import { findTimeQueries } from './find-time-queries.js';

interface SearchProgressProps {
  readonly isFetching: boolean;
  readonly wasStopped: boolean;
  readonly spacecraftCount: number;
  readonly searchId: string;
  readonly onStop: () => void;
  readonly onAgain: () => void;
}

/** Most answers come at once; only a search that takes longer says so. */
const PATIENCE_S = 1;

/** How often a long search is asked how far it is. */
const ASK_MS = 700;

/** A long search says how far it is and for how long it has been at work, and can be stopped. */
export function SearchProgress(props: SearchProgressProps) {
  const { isFetching, wasStopped, spacecraftCount, searchId, onStop, onAgain } = props;
  const elapsedS = useElapsedS(isFetching);
  const isLong = isFetching && elapsedS >= PATIENCE_S;
  const { data: progress } = useQuery({
    ...findTimeQueries.progress(searchId),
    enabled: isLong,
    refetchInterval: ASK_MS,
  });
  if (wasStopped)
    return (
      <div className={classes.progress} role="status">
        <span>The search was stopped; nothing was changed.</span>
        <Button variant="default" onClick={onAgain}>
          Search again
        </Button>
      </div>
    );
  if (!isLong) return null;
  return (
    <div className={classes.progress}>
      <span role="status">
        Computing passes of {spacecraftCount} spacecraft
        <span aria-hidden="true">
          {progress &&
            `, ${formatNumber(progress.done, 0)} of ${formatNumber(progress.of, 0)} pairs with an antenna done`}
          , {elapsedS} s so far
        </span>
      </span>
      <Progress
        value={progress ? (100 * progress.done) / Math.max(1, progress.of) : 100}
        animated={!progress}
        striped={!progress}
        aria-label="Computing passes"
        className={classes.progressBar}
      />
      <Button variant="default" size="compact-sm" onClick={onStop}>
        Stop the search
      </Button>
    </div>
  );
}

function useElapsedS(isRunning: boolean): number {
  const [elapsedS, setElapsedS] = useState(0);
  useEffect(() => {
    setElapsedS(0);
    if (!isRunning) return;
    const timer = window.setInterval(() => setElapsedS((seconds) => seconds + 1), 1_000);
    return () => window.clearInterval(timer);
  }, [isRunning]);
  return elapsedS;
}
