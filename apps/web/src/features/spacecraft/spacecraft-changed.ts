import type { Spacecraft } from '@skyberth/shared';
import type { QueryClient } from '@tanstack/react-query';
import { spacecraftQueries } from '../../lib/spacecraft-queries.js';

/** Puts a changed spacecraft in place; lists and passes, which depend on it, are read again. */
export function spacecraftChanged(client: QueryClient, craft: Spacecraft): void {
  client.setQueryData(spacecraftQueries.one(craft.id).queryKey, craft);
  void client.invalidateQueries({ queryKey: [...spacecraftQueries.all, 'list'] });
  void client.invalidateQueries({ queryKey: ['passes'] });
}
