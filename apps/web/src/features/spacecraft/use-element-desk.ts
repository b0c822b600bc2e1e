/** Reading and saving of element sets: what is on the desk, what was found in it, what was saved. */
import { routes } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useRef, useState } from 'react';
import { call } from '../../lib/api-client.js';
import { spacecraftQueries } from '../../lib/spacecraft-queries.js';
import type { SaveChoice } from './element-saving.js';

export interface DeskText {
  readonly text: string;
  /** Null for pasted or typed text. */
  readonly fileName: string | null;
}

/** What the contract takes at once. */
const MOST_CHARACTERS = 8_000_000;
const EMPTY: DeskText = { text: '', fileName: null };

export type ElementDeskState = ReturnType<typeof useElementDesk>;

/** `attachTo` is the spacecraft that a single set belongs to whatever its number, or null. */
export function useElementDesk(attachTo: string | null) {
  const client = useQueryClient();
  const [desk, setDesk] = useState<DeskText>(EMPTY);
  const aborter = useRef<AbortController | null>(null);
  const read = useMutation({
    mutationFn: (given: DeskText & { readonly spacecraftId: string | null }) => {
      aborter.current = new AbortController();
      return call(routes.readElements, { body: given, signal: aborter.current.signal });
    },
  });
  const save = useMutation({
    mutationFn: (choice: SaveChoice) =>
      call(routes.saveElements, { body: { ...desk, spacecraftId: attachTo, ...choice } }),
    onSuccess: () => {
      void client.invalidateQueries({ queryKey: spacecraftQueries.all });
      void client.invalidateQueries({ queryKey: ['passes'] });
      void client.invalidateQueries({ queryKey: ['bookings'] });
    },
  });
  const cancel = () => {
    aborter.current?.abort();
    read.reset();
  };
  const readNow = (given: DeskText, spacecraftId: string | null) => {
    save.reset();
    if (given.text.trim() === '' || given.text.length > MOST_CHARACTERS) read.reset();
    else read.mutate({ ...given, spacecraftId });
  };
  const isOfThisText = read.variables?.text === desk.text && (read.variables?.spacecraftId ?? null) === attachTo;
  return {
    desk,
    isTooLong: desk.text.length > MOST_CHARACTERS,
    /** Puts a text on the desk and reads it at once. */
    take: (given: DeskText) => {
      setDesk(given);
      readNow(given, attachTo);
    },
    type: (text: string) => setDesk((now) => ({ text, fileName: text === '' ? null : now.fileName })),
    readAgain: (spacecraftId: string | null = attachTo) => readNow(desk, spacecraftId),
    cancel,
    clear: () => {
      cancel();
      save.reset();
      setDesk(EMPTY);
    },
    isReading: read.isPending,
    readError: read.isError && isOfThisText ? read.error : null,
    /** What was found; null until the text as it stands has been read. */
    reading: isOfThisText ? (read.data ?? null) : null,
    hasChangedSince: read.data !== undefined && !isOfThisText,
    save: save.mutate,
    isSaving: save.isPending,
    saveError: save.error,
    saved: save.data ?? null,
  };
}
