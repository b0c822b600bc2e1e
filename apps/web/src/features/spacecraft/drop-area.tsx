import { type DragEvent, type ReactNode, useState } from 'react';
import classes from './elements.module.css';

interface DropAreaProps {
  readonly label: string;
  readonly onFile: (file: File | null) => void;
  readonly children: ReactNode;
}

/** A file may be dropped on the text; the button beside it does the same for a keyboard. */
export function DropArea({ label, onFile, children }: DropAreaProps) {
  const [isOver, setOver] = useState(false);
  const hasFile = (event: DragEvent) => event.dataTransfer.types.includes('Files');
  return (
    <fieldset
      aria-label={label}
      className={classes.drop}
      data-over={isOver || undefined}
      onDragOver={(event) => {
        if (!hasFile(event)) return;
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={(event) => {
        setOver(false);
        if (!hasFile(event)) return;
        event.preventDefault();
        onFile(event.dataTransfer.files[0] ?? null);
      }}
    >
      {children}
    </fieldset>
  );
}
