/**
 * A request that acts on a cookie must come from our own page: its Origin is ours, and it carries a header that
 * no form or foreign page can add without asking first.
 */
import type { Request } from 'express';
import type { Config } from '@/server/config';
import { ProblemError } from '@/server/http/problem';

const LOCAL_NAMES = ['localhost', '127.0.0.1'];

export function requireOwnPage(request: Request, { origin, isProduction }: Config): void {
  const from = request.get('origin');
  const isMarked = request.get('x-landfall') === '1';
  if (!isMarked || from === undefined || !URL.canParse(from)) throw refusal();
  const { host, hostname } = new URL(from);
  const isOwn = host === request.host || host === new URL(origin).host;
  // In development the page comes from the bundler, on another port of the same machine.
  const isBundler = !isProduction && LOCAL_NAMES.includes(hostname);
  if (!isOwn && !isBundler) throw refusal();
}

const refusal = (): ProblemError =>
  new ProblemError('forbidden', 'This request must come from the page itself');
