/** One well-formed call of every route that takes parameters or a body: what a careful stranger would send. */
import { randomUUID } from 'node:crypto';
import type { RouteName } from '@skyberth/shared';
import { PASSWORD } from '../api/harness/people.js';
import { ALWAYS, ANTENNA, BANDS, PRICE, STATION } from '../api/harness/stations.js';

export interface Wish {
  readonly params?: Record<string, string>;
  readonly body?: unknown;
}

/** The things that routes address; each must belong to somebody else where a test asks for a refusal. */
export interface Targets {
  readonly spacecraft: string;
  readonly station: string;
  readonly antenna: string;
  readonly blackout: string;
  readonly booking: string;
  readonly invoice: string;
  readonly visit: string;
  readonly file: string;
  readonly clearance: string;
  readonly member: string;
  readonly organisation: string;
  readonly dispute: string;
  readonly group: string;
  readonly place: string;
  readonly plan: string;
  readonly apiKey: string;
  readonly feed: string;
}

/** Targets that do not exist. */
export const nowhere = (): Targets => ({
  spacecraft: randomUUID(),
  station: randomUUID(),
  antenna: randomUUID(),
  blackout: randomUUID(),
  booking: randomUUID(),
  invoice: randomUUID(),
  visit: randomUUID(),
  file: randomUUID(),
  clearance: randomUUID(),
  member: randomUUID(),
  organisation: randomUUID(),
  dispute: randomUUID(),
  group: randomUUID(),
  place: randomUUID(),
  plan: randomUUID(),
  apiKey: randomUUID(),
  feed: randomUUID(),
});

const ADDRESS = { line1: 'Quay 1', postalCode: '1', city: 'Porto Novo', country: 'DE' };
const SPACECRAFT = { name: 'Curlew 9', shortName: 'C9' };
const FROM = '2026-12-20T10:00:00Z';
const TO = '2026-12-20T10:08:00Z';
const OPENING = {
  startLocal: '2026-12-20T10:00',
  durationMin: 60,
  endLocal: null,
  timeZone: 'Europe/Oslo',
  rrule: 'FREQ=WEEKLY',
};
const plan = (spacecraftId: string) => ({
  name: 'A day',
  firstDay: '2027-01-04',
  days: 1,
  craft: [{ spacecraftId, contactsPerDay: 1 }],
  currency: { kind: 'one', currency: 'EUR' },
});
const RULING = { outcome: 'none', refundBasisPoints: 0, borneBy: 'owner' };
const REPORT = {
  outcome: 'good',
  cause: 'none',
  acquiredUtc: null,
  lostUtc: null,
  receivedBytes: 1,
  ebN0Db: null,
  note: '',
};

/** Only routes without parameters and without a body may be left out; a test holds that. */
export function wishes(to: Targets): Partial<Record<RouteName, Wish>> {
  const berth = { antennaId: to.antenna, spacecraftId: to.spacecraft, aosUtc: FROM, losUtc: TO };
  const spacecraft = { id: to.spacecraft };
  const station = { id: to.station };
  const antenna = { id: to.antenna };
  const booking = { id: to.booking };
  return {
    uploadFile: {},
    getClearance: { params: { id: to.clearance } },
    requestClearance: {
      body: {
        spacecraftId: to.spacecraft,
        stationId: to.station,
        band: 'S',
        validFromUtc: FROM,
        validToUtc: '2027-12-20T10:00:00Z',
        purpose: 'Commands.',
        fileIds: [to.file],
      },
    },
    answerClearance: { params: { id: to.clearance }, body: { answer: 'grant' } },
    checkClearance: { params: { id: to.clearance }, body: { answer: 'put in force' } },
    withdrawClearance: { params: { id: to.clearance }, body: { reason: 'No longer needed.' } },
    downloadFile: { params: { id: to.file } },
    signUp: {
      body: {
        name: 'Kim',
        email: `${randomUUID()}@people.example`,
        password: PASSWORD,
        organisation: { name: randomUUID(), kind: 'operator', address: ADDRESS },
      },
    },
    signIn: { body: { email: 'nobody@people.example', password: PASSWORD } },
    switchOrganisation: { body: { organisationId: randomUUID() } },
    verifyEmail: { body: { token: 'made-up' } },
    requestPasswordReset: { body: { email: `${randomUUID()}@people.example` } },
    setPassword: { body: { token: 'made-up', password: PASSWORD } },
    updateOrganisation: { body: { billingEmail: 'bills@people.example' } },
    inviteMember: { body: { name: 'Kim', email: `${randomUUID()}@people.example`, role: 'viewer' } },
    changeMember: { params: { personId: to.member }, body: { role: 'viewer' } },
    removeMember: { params: { personId: to.member } },
    listSpacecraft: {},
    createSpacecraft: { body: { ...SPACECRAFT, name: randomUUID() } },
    getSpacecraft: { params: spacecraft },
    updateSpacecraft: { params: spacecraft, body: SPACECRAFT },
    retireSpacecraft: { params: spacecraft },
    listElements: { params: spacecraft },
    readElements: { body: { text: 'x', spacecraftId: to.spacecraft } },
    saveElements: { body: { text: 'x', spacecraftId: to.spacecraft } },
    listEphemerides: { params: spacecraft },
    addEphemeris: { params: spacecraft, body: { text: 'x' } },
    withdrawEphemeris: { params: { ...spacecraft, ephemerisId: randomUUID() } },
    listStations: {},
    createStation: { body: { ...STATION, name: randomUUID() } },
    getStation: { params: station },
    updateStation: { params: station, body: STATION },
    submitStation: { params: station },
    decideStation: { params: station, body: { decision: 'approve', note: 'fine' } },
    createAntenna: { params: station, body: ANTENNA },
    getAntenna: { params: antenna },
    updateAntenna: { params: antenna, body: ANTENNA },
    setBands: { params: antenna, body: { bands: BANDS } },
    listMasks: { params: antenna },
    setMask: { params: antenna, body: { points: [[0, 5]] } },
    readMaskCsv: { body: { text: '0,5' } },
    setAvailability: { params: antenna, body: { rules: ALWAYS } },
    setPrice: { params: antenna, body: PRICE },
    addBlackout: { params: antenna, body: { fromUtc: FROM, toUtc: TO, reason: 'weather' } },
    removeBlackout: { params: { id: to.blackout } },
    antennaCalendar: { params: antenna },
    addOpening: { params: antenna, body: OPENING },
    addBlackouts: { body: { antennaIds: [to.antenna], entries: [{ ...OPENING, reason: 'weather' }] } },
    removeCalendarEntries: { body: { ids: [to.blackout] } },
    readCalendarFile: { body: { text: 'BEGIN:VCALENDAR', timeZone: 'Europe/Oslo' } },
    previewAntennaChange: { params: antenna, body: { hours: ALWAYS } },
    priceExample: {
      params: antenna,
      body: { price: PRICE, contact: { lengthS: 480, day: 2, startLocal: '18:10', boughtHoursBefore: 24 } },
    },
    listPriceCards: { params: antenna },
    putOnSale: { params: antenna, body: { onSale: true } },
    searchProgress: { params: { searchId: randomUUID() } },
    searchPasses: { body: { spacecraftIds: [to.spacecraft], fromUtc: FROM, toUtc: TO } },
    passDetail: { body: berth },
    listBookings: {},
    exportBookings: {},
    getBooking: { params: booking },
    bookingGeometry: { params: booking },
    bookingFile: { params: { ...booking, file: 'pointing.csv' } },
    holdBerth: { body: { ...berth, expectedToPayMinor: 1 } },
    letGo: { params: booking },
    holdGroup: { body: { items: [{ ...berth, expectedToPayMinor: 1 }] } },
    getGroup: { params: { id: to.group } },
    checkoutGroup: { params: { id: to.group }, body: {} },
    letGroupGo: { params: { id: to.group } },
    joinStandby: { body: berth },
    leaveStandby: { params: { id: to.place } },
    checkout: { params: booking, body: {} },
    cancelBooking: { params: booking, body: { expectedRefundMinor: 0 } },
    acceptBooking: { params: booking },
    declineBooking: { params: booking, body: { reason: 'no' } },
    reportContact: { params: booking, body: REPORT },
    contactEvents: { params: booking },
    contactOrbit: { params: booking },
    contactLive: { params: booking },
    reportLive: { params: booking, body: { kind: 'acquired' } },
    enterDish: { params: antenna, body: { name: 'Kim' } },
    leaveDish: { params: { id: to.visit } },
    stopDish: { params: antenna, body: { reason: 'ice' } },
    releaseDish: { params: antenna },
    writeHandOver: { params: station, body: { text: 'wind' } },
    bookingDrift: { params: booking },
    acceptDrift: { params: booking, body: { questionId: randomUUID() } },
    refuseDrift: { params: booking, body: { questionId: randomUUID() } },
    listInvoices: {},
    getInvoice: { params: { id: to.invoice } },
    invoicePdf: { params: { id: to.invoice } },
    journal: {},
    askCredit: { body: { currency: 'EUR', wishedMinor: 100_000, note: 'Daily passes.' } },
    buyOnAccount: { params: booking },
    payBill: { params: { id: to.invoice } },
    decideCredit: { params: { id: to.invoice }, body: { decision: 'open', limitMinor: 1_000, reason: 'Known to us.' } },
    ledgerFile: { params: { file: 'journal.csv' } },
    importMovements: { body: { text: 'id,type,amount,fee,net,currency,created\n' } },
    resolveMovement: { params: { id: 'txn_nowhere' }, body: { action: 'suspense', reason: 'Nobody knows it.' } },
    closeMonth: { params: { month: '2020-01' } },
    listThreads: {},
    listMessages: { params: booking },
    sendMessage: { params: booking, body: { text: 'Ahoy.' } },
    readMessages: { params: booking, body: { messageId: randomUUID() } },
    listDisputes: {},
    getDispute: { params: { id: to.dispute } },
    createPlan: { body: plan(to.spacecraft) },
    getPlan: { params: { id: to.plan } },
    replan: { params: { id: to.plan }, body: { need: plan(to.spacecraft) } },
    stopPlan: { params: { id: to.plan } },
    holdPlan: { params: { id: to.plan }, body: {} },
    giveUpPlan: { params: { id: to.plan } },
    openDispute: { params: booking, body: { reason: 'other', text: 'Nothing came down.' } },
    stateInDispute: { params: { id: to.dispute }, body: { text: 'So it was.' } },
    askInDispute: { params: { id: to.dispute }, body: { side: 'owner', text: 'Why?' } },
    assembleEvidence: { params: { id: to.dispute } },
    previewDecision: { params: { id: to.dispute }, body: RULING },
    decideDispute: { params: { id: to.dispute }, body: { terms: RULING, text: 'So.', expectedRefundMinor: 0 } },
    appealDecision: { params: { id: to.dispute }, body: { text: 'No.' } },
    precedents: {},
    listAccounts: {},
    getAccount: { params: { id: to.organisation } },
    suspendAccount: { params: { id: to.organisation }, body: { reason: 'look' } },
    reinstateAccount: { params: { id: to.organisation }, body: { reason: 'look' } },
    listAudit: {},
    makeApiKey: { body: { name: 'Console', scopes: ['bookings.read'] } },
    revokeApiKey: { params: { id: to.apiKey } },
    makeCalendarFeed: { body: {} },
    revokeCalendarFeed: { params: { id: to.feed } },
    readCalendarFeed: { params: { token: 'made-up-and-long-enough' } },
    listPayoutRuns: {},
    getPayoutRun: { params: { id: randomUUID() } },
    preparePayoutRun: { body: { currency: 'XAF' } },
    holdPayoutLine: { params: { id: randomUUID(), lineId: randomUUID() }, body: { reason: 'look' } },
    adjustPayoutLine: { params: { id: randomUUID(), lineId: randomUUID() }, body: { amountMinor: 1, reason: 'look' } },
    reviewPayoutRun: { params: { id: randomUUID() }, body: { code: '000000' } },
    approvePayoutRun: { params: { id: randomUUID() }, body: { code: '000000', expectedMinor: 1 } },
    dropPayoutRun: { params: { id: randomUUID() } },
    beginSecondFactor: { body: { password: 'not the right one' } },
    confirmSecondFactor: { body: { code: '000000' } },
  };
}
