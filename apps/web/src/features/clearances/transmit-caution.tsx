import { Caution } from '../../ui/caution.js';

/** Stands where leave to transmit is asked for, given and checked. */
export function TransmitCaution() {
  return (
    <Caution title="A clearance is no licence">
      Transmitting without licence and coordination is unlawful and can harm other users, and uplink power near people
      is a radiation hazard. Local codes, the licence, licensed practitioners and the station&rsquo;s own interlocks
      come first; Skyberth grants no right to a frequency and replaces none of them.
    </Caution>
  );
}
