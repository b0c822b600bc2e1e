/** Every word of the trade that the pages use, said in plain English once. The help page lists them; `Term` shows them in place. */
export const TERMS = {
  aos: {
    word: 'AOS',
    long: 'acquisition of signal',
    meaning:
      'The instant a spacecraft rises over the horizon that the antenna really has: its mask or its lowest elevation, whichever is higher.',
  },
  los: {
    word: 'LOS',
    long: 'loss of signal',
    meaning: 'The instant it sinks below that horizon again.',
  },
  tca: {
    word: 'TCA',
    long: 'time of closest approach',
    meaning:
      'The instant in a pass when the spacecraft is nearest; the range rate is zero and the Doppler shift turns.',
  },
  pass: {
    word: 'Pass',
    meaning:
      'The time from AOS to LOS: what the geometry gives. An obstacle in the mask can cut one overflight in two.',
  },
  contact: {
    word: 'Contact',
    meaning: 'A pass, or a part of one, that was bought and is flown.',
  },
  mask: {
    word: 'Mask',
    meaning:
      'The horizon of an antenna: the lowest usable elevation for every azimuth, with hills, trees and buildings. Linear between its points.',
  },
  azimuth: { word: 'Azimuth', meaning: 'Direction along the horizon, in degrees from true north through east.' },
  elevation: { word: 'Elevation', meaning: 'Height above the horizontal plane, in degrees; 90° is overhead.' },
  keyhole: {
    word: 'Keyhole',
    meaning:
      'The part of the sky that a mount cannot follow fast enough: around the zenith for an azimuth-elevation mount, around the ends of the lower axis for an X over Y mount.',
  },
  gOverT: {
    word: 'G/T',
    long: 'gain over system noise temperature',
    meaning: 'How well a receiving antenna hears, in dB/K. Higher is better.',
  },
  eirp: {
    word: 'EIRP',
    long: 'equivalent isotropically radiated power',
    meaning: 'How strongly a transmitter is heard in its best direction, in dBW.',
  },
  ebN0: {
    word: 'Eb/N0',
    long: 'energy per bit over noise density',
    meaning: 'How clearly each bit is heard, in dB. Every modulation and coding needs a certain value.',
  },
  margin: {
    word: 'Margin',
    meaning: 'Eb/N0 that the link gives less what it needs, in dB. Below zero the data do not come through.',
  },
  doppler: {
    word: 'Doppler',
    meaning: 'The shift of a frequency by the speed along the line of sight. The receiver must follow it.',
  },
  downlink: { word: 'Downlink', meaning: 'From the spacecraft to the ground.' },
  uplink: {
    word: 'Uplink',
    meaning:
      'From the ground to the spacecraft. It needs a licence, coordination, and a clearance for this spacecraft at this station and band.',
  },
  clearance: {
    word: 'Clearance',
    meaning:
      'The permission to transmit to one spacecraft from one station in one band, granted by the station, checked by the marketplace, with an end date. It replaces no licence.',
  },
  tle: {
    word: 'TLE',
    long: 'two-line element set',
    meaning: 'A short description of an orbit at one instant, from which passes are computed. It ages within days.',
  },
  omm: {
    word: 'OMM',
    long: 'orbit mean-elements message (CCSDS 502.0)',
    meaning: 'The same elements in an open format with names for every figure.',
  },
  oem: {
    word: 'OEM',
    long: 'orbit ephemeris message (CCSDS 502.0)',
    meaning: 'A table of positions and velocities. More exact than elements inside its span, silent outside it.',
  },
  epoch: { word: 'Epoch', meaning: 'The instant for which elements hold best. Their age counts from it.' },
  guard: {
    word: 'Guard',
    meaning: 'Set-up before AOS and teardown after LOS. The antenna is busy for a contact with its guards.',
  },
  hold: { word: 'Hold', meaning: 'A pass kept for you at a frozen price for ten minutes while you pay.' },
  berth: { word: 'Berth', meaning: 'A booking: your time alongside the antenna.' },
  standby: {
    word: 'Standby',
    meaning:
      'Waiting in line for a pass that is taken. When it frees, the first in line is offered it for a limited time.',
  },
  ladder: {
    word: 'Refund steps',
    meaning: 'How much of the price comes back when you cancel, by the hours left before AOS.',
  },
  umbra: {
    word: 'Eclipse',
    meaning: 'The spacecraft is in the shadow of the Earth: in full shadow (umbra) or half shadow (penumbra).',
  },
  sunOutage: {
    word: 'Sun interference',
    meaning: 'The Sun stands behind the spacecraft and drowns its signal; pointing at it can also damage a receiver.',
  },
  payout: { word: 'Payout', meaning: 'What an owner is paid for settled contacts, less the fee and refunds.' },
  creditNote: { word: 'Credit note', meaning: 'The paper that takes back an invoice, in full or in part.' },
} as const satisfies Record<string, { readonly word: string; readonly long?: string; readonly meaning: string }>;

export type TermName = keyof typeof TERMS;
