/** An element feed over HTTP, with conditional requests (RFC 9110, section 13). */
import type { ElementFeedPort, FeedAnswer } from '../../spacecraft/element-feed.port.js';

const ANSWER_WITHIN_MS = 30_000;
const MOST_BYTES = 20_000_000;

export class HttpFeedAdapter implements ElementFeedPort {
  readonly name: string;

  constructor(private readonly url: string) {
    this.name = `feed ${new URL(url).host}`;
  }

  async fetch(validator: string | null): Promise<FeedAnswer> {
    const response = await fetch(this.url, {
      headers: validator === null ? {} : { 'If-None-Match': validator },
      signal: AbortSignal.timeout(ANSWER_WITHIN_MS),
    });
    if (response.status === 304) return { kind: 'unchanged' };
    if (!response.ok || !response.body) {
      await response.body?.cancel();
      throw new Error(`The element feed answered ${response.status}.`);
    }
    return { kind: 'changed', text: await limitedText(response.body), validator: response.headers.get('etag') };
  }
}

/** Counts while it reads, since a length that is announced need not be true. */
async function limitedText(body: ReadableStream<Uint8Array>): Promise<string> {
  const parts: Uint8Array[] = [];
  let bytes = 0;
  for await (const part of body) {
    bytes += part.byteLength;
    if (bytes > MOST_BYTES) throw new Error(`The element feed sent more than ${MOST_BYTES} bytes.`);
    parts.push(part);
  }
  return Buffer.concat(parts).toString('utf8');
}
