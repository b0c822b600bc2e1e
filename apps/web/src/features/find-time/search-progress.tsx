import { Button, Progress } from '@mantine/core';
import { useEffect, useState } from 'react';
import classes from './find-time.module.css';

interface SearchProgressProps {
  readonly isFetching: boolean;
  readonly wasStopped: boolean;
  readonly spacecraftCount: number;
  readonly onStop: () => void;
  readonly onAgain: () => void;
}

/** Most answers come at once; only a search that takes longer says so. */
const PATIENCE_S = 1;

/** A long search says that it is at work, for how long already, and can be stopped. */
export function SearchProgress(props: SearchProgressProps) {
  const { isFetching, wasStopped, spacecraftCount, onStop, onAgain } = props;
  const elapsedS = useElapsedS(isFetching);
  if (wasStopped)
    return (
      <div className={classes.progress} role="status">
        <span>The search was stopped; nothing was changed.</span>
        <Button variant="default" onClick={onAgain}>
          Search again
        </Button>
      </div>
    );
  if (!isFetching || elapsedS < PATIENCE_S) return null;
  return (
    <div className={classes.progress}>
      <span role="status">
        Computing passes of {spacecraftCount} spacecraft
        <span aria-hidden="true">, {elapsedS} s so far</span>
      </span>
      <Progress value={100} animated striped aria-label="Computing passes" className={classes.progressBar} />
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
