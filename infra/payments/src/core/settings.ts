/** What a start of the payment stand-in can choose. Everything has a safe default but the data folder. */
export interface Settings {
  /** Port on 127.0.0.1; 0 asks the system for a free one. */
  port: number;
  /** Folder of the SQLite file, or ':memory:' for a service that forgets. */
  dataDir: string;
  secretKey: string;
  publishableKey: string;
  /** Days between a charge and its money becoming available. */
  settlementDays: number;
  feeBasisPoints: number;
  feeFixedMinor: number;
  disputeFeeMinor: number;
  /** How long the slow test card keeps the caller waiting. The SDK gives up after 80 s unless told otherwise. */
  slowAnswerMs: number;
  /** Waiting time before the 2nd, 3rd, ... delivery attempt; after the last one the delivery has failed. */
  retryDelaysMs: readonly number[];
  deliveryTimeoutMs: number;
  /** How far ahead (behind: negative) of the machine an empty service begins; the demo begins months ago and moves forward. */
  startOffsetMs: number;
  /** Hosts besides this machine that webhooks may be sent to and that the pages may send a browser back to. */
  trustedHosts: readonly string[];
  /** A webhook endpoint with a known secret, kept in step at every start. */
  webhook: { url: string; secret: string } | undefined;
}

const SECOND_MS = 1000;
const MINUTE_MS = 60 * SECOND_MS;
const HOUR_MS = 60 * MINUTE_MS;

export const DEFAULT_SETTINGS: Settings = {
  port: 0,
  dataDir: ':memory:',
  secretKey: 'sk_test_skyberth_local',
  publishableKey: 'pk_test_skyberth_local',
  settlementDays: 2,
  feeBasisPoints: 150,
  feeFixedMinor: 25,
  disputeFeeMinor: 1500,
  slowAnswerMs: 100 * SECOND_MS,
  retryDelaysMs: [SECOND_MS, 5 * SECOND_MS, 30 * SECOND_MS, 5 * MINUTE_MS, HOUR_MS, 6 * HOUR_MS, 24 * HOUR_MS],
  deliveryTimeoutMs: 10 * SECOND_MS,
  startOffsetMs: 0,
  trustedHosts: [],
  webhook: undefined,
};
