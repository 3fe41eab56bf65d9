/** Metro: one locale of zod instead of fifty, and in development the API behind the page's own origin. */
const http = require('node:http');
const { getDefaultConfig } = require('expo/metro-config');

const config = getDefaultConfig(__dirname);

const ZOD_LOCALES = /(^|\/)locales\/index(\.(js|cjs))?$/;
config.resolver.resolveRequest = (context, moduleName, platform) => {
  const isZod = context.originModulePath.includes('/node_modules/zod/');
  if (isZod && ZOD_LOCALES.test(moduleName)) {
    return context.resolveRequest(context, 'zod/v4/locales/en.js', platform);
  }
  return context.resolveRequest(context, moduleName, platform);
};

const API_PORT = Number(process.env.PORT ?? 3000);
config.server.enhanceMiddleware = (metro) => (request, response, next) => {
  if (!request.url.startsWith('/api/')) return metro(request, response, next);
  const options = {
    host: 'localhost',
    port: API_PORT,
    path: request.url,
    method: request.method,
    headers: request.headers,
  };
  const upstream = http.request(options, (reply) => {
    response.writeHead(reply.statusCode ?? 502, reply.headers);
    reply.pipe(response);
  });
  upstream.on('error', () => response.writeHead(502).end('The API does not answer'));
  request.pipe(upstream);
};

module.exports = config;
