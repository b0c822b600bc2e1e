import type { Antenna, Station } from '@skyberth/shared';

/** What every tab of the antenna's page is given. */
export interface TabProps {
  readonly antenna: Antenna;
  readonly station: Station;
  readonly mayWrite: boolean;
}
