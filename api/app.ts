/** Builds the HTTP application; it does not listen. */
import compression from "compression";
import express, { type Express, type RequestHandler } from "express";
import helmet from "helmet";
import { pinoHttp } from "pino-http";
import { apiRoutes } from "./routes/api.ts";
import { nothingHere, problemHandler } from "./routes/door.ts";
import { notReady } from "./routes/health.ts";
import { pageRoutes } from "./routes/page.ts";
import type { Service } from "./routes/service.ts";

export function buildApp(service: Service): Express {
  const app = express();
  app.disable("x-powered-by");
  app.set("query parser", "simple");
  app.use(requestLog(service), securityHeaders, compress, refuseWhileClosing(service), freshness);
  const router = express.Router({ caseSensitive: true, strict: true });
  apiRoutes(router, service);
  pageRoutes(router, service);
  app.use(router);
  app.use(nothingHere);
  app.use(problemHandler((error) => service.log.error({ err: error }, "a request failed")));
  return app;
}

function requestLog({ log }: Service): RequestHandler {
  return pinoHttp({
    logger: log,
    customLogLevel: (_request, response) => (response.statusCode >= 500 ? "error" : "info"),
    serializers: {
      req: (request: { method: string; url: string }) => ({ method: request.method, url: request.url }),
      res: (response: { statusCode: number }) => ({ status: response.statusCode }),
    },
  });
}

/** Only our own files run and are loaded; nothing inline. Plain http on the loopback: no upgrade to https is asked for. */
const securityHeaders = helmet({
  contentSecurityPolicy: {
    useDefaults: false,
    directives: {
      defaultSrc: ["'self'"],
      scriptSrc: ["'self'"],
      styleSrc: ["'self'"],
      imgSrc: ["'self'", "data:", "blob:"],
      connectSrc: ["'self'"],
      workerSrc: ["'self'", "blob:"],
      objectSrc: ["'none'"],
      baseUri: ["'none'"],
      formAction: ["'self'"],
      frameAncestors: ["'none'"],
    },
  },
  strictTransportSecurity: false,
});

/** Event streams go out piece by piece, uncompressed. */
const compress: RequestHandler = compression({
  filter: (request, response) =>
    !String(response.getHeader("Content-Type")).startsWith("text/event-stream") &&
    compression.filter(request, response),
});

/** Whoever still holds a connection is sent away; whether the process lives may be asked to the end. */
function refuseWhileClosing(service: Service): RequestHandler {
  return (request, _response, next) => {
    next(service.closing() && request.path !== "/healthz" ? notReady() : undefined);
  };
}

/** Answers may be kept, but have to be asked for again: jobs move. */
const freshness: RequestHandler = (_request, response, next) => {
  response.set("Cache-Control", "no-cache");
  next();
};
