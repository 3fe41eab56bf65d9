/**
 * The log names what is allowed and nothing else: ids, route patterns, status, time. Never bodies, addresses with
 * their query, names or tokens. Messages of errors may quote values, so production keeps only where they arose.
 */
import type { IncomingMessage, ServerResponse } from 'node:http';
import type { RequestHandler, Response } from 'express';
import pino, { type DestinationStream, type Logger } from 'pino';
import { pinoHttp } from 'pino-http';
import type { Actor } from '@/server/act';
import { requestIdOf } from '@/server/http/request-id';

export interface LoggerOptions {
  isProduction: boolean;
  level?: string;
  destination?: DestinationStream;
}

export function createLogger({ isProduction, level = 'info', destination }: LoggerOptions): Logger {
  const options = {
    level,
    base: undefined,
    timestamp: pino.stdTimeFunctions.isoTime,
    serializers: { err: (error: unknown) => describeError(error, isProduction) },
  };
  return destination ? pino(options, destination) : pino(options);
}

export function requestLog(logger: Logger): RequestHandler {
  const summary = (request: IncomingMessage, response: ServerResponse, value: { responseTime: number }) => {
    const { route, actor } = (response as Response).locals;
    return {
      method: request.method,
      route: (route as string | undefined) ?? 'unmatched',
      status: response.statusCode,
      ms: value.responseTime,
      accountId: (actor as Actor | undefined)?.id,
    };
  };
  return pinoHttp({
    logger,
    genReqId: (_request, response) => requestIdOf(response as Response),
    customAttributeKeys: { reqId: 'requestId' },
    wrapSerializers: false,
    serializers: { req: () => undefined, res: () => undefined },
    quietReqLogger: true,
    quietResLogger: true,
    customLogLevel: (_request, response) => (response.statusCode >= 500 ? 'error' : 'info'),
    customSuccessMessage: () => 'request',
    customErrorMessage: () => 'request',
    customSuccessObject: summary,
    customErrorObject: (...[request, response, , value]) => summary(request, response, value),
  });
}

function describeError(error: unknown, isProduction: boolean) {
  if (!(error instanceof Error)) return { name: typeof error };
  const frames = error.stack?.split('\n').filter((line) => line.startsWith('    at ')) ?? [];
  // Errors of the database carry the driver's own, more telling one as their parent.
  const { code, parent } = error as { code?: unknown; parent?: unknown };
  return {
    name: error.name,
    code: typeof code === 'string' ? code : undefined,
    ...(isProduction ? {} : { message: parent instanceof Error ? parent.message : error.message }),
    stack: frames.join('\n'),
  };
}
