/** Readings of the system page. */
import type { SystemView } from '@skyberth/shared';
import { formatDayTime } from '../../ui/format.js';

type Service = SystemView['services'][number];

const JOB = 'job: ';
const ISO_TIME = /\d{4}-\d{2}-\d{2}T[\d:.]+Z/g;

/** Services beside the server, and the jobs it runs; the API lists both together. */
export function servicesAndJobs(services: readonly Service[]): {
  readonly services: readonly Service[];
  readonly jobs: readonly Service[];
} {
  return {
    services: services.filter((one) => !one.name.startsWith(JOB)),
    jobs: services
      .filter((one) => one.name.startsWith(JOB))
      .map((one) => ({ ...one, name: one.name.slice(JOB.length), detail: readable(one.detail) })),
  };
}

/** Instants as the rest of the page writes them. */
const readable = (detail: string): string => detail.replaceAll(ISO_TIME, (time) => formatDayTime(Date.parse(time)));

/** What is not fine, a sentence each; empty when all is well. */
export function faultsOf(view: SystemView): string[] {
  return [
    ...(view.database.integrity === 'ok' ? [] : [`The database says: ${view.database.integrity}.`]),
    ...view.services.filter((one) => !one.ok).map((one) => `${one.name}: ${one.detail}.`),
    ...(view.outbox.failed === 0
      ? []
      : [`${view.outbox.failed} ${view.outbox.failed === 1 ? 'thing' : 'things'} to send failed for good.`]),
  ];
}
