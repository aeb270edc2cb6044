import { existsSync } from 'node:fs';
import { join } from 'node:path';
import type { NestExpressApplication } from '@nestjs/platform-express';
import type { NextFunction, Request, Response } from 'express';

/** The built application: files by name (hashed ones for good), and its page for every other address outside the API. */
export function serveApp(app: NestExpressApplication, folder: string): boolean {
  const page = join(folder, 'index.html');
  if (!existsSync(page)) return false;
  app.useStaticAssets(folder, {
    index: false,
    setHeaders: (response: Response, path: string) =>
      response.setHeader(
        'Cache-Control',
        path.includes('/assets/') ? 'public, max-age=31536000, immutable' : 'no-cache',
      ),
  });
  app.use((request: Request, response: Response, next: NextFunction) => {
    const isPage = request.method === 'GET' || request.method === 'HEAD';
    const isOurs = !/^\/(api|assets)(\/|$)/.test(request.path);
    if (!isPage || !isOurs || !request.accepts('html')) return next();
    response.setHeader('Cache-Control', 'no-cache');
    response.sendFile(page);
  });
  return true;
}
