import { type RequestHandler, Router } from 'express';

/**
 * The same routes, looked up among those of the same shape alone: Express tries one route after another, and a hundred of them take
 * longer than an ordinary answer. The shape of a path: how many parts it has, and what of a team it is about.
 */
export function routesByShape(all: Router): RequestHandler {
  const byShape = new Map<string, Router>();
  for (const layer of all.stack) {
    const path = layer.route?.path;
    if (path === undefined) throw new Error('Only routes can be told apart by their shape.');
    const shape = shapeOf(path);
    const router = byShape.get(shape) ?? Router();
    router.stack.push(layer);
    byShape.set(shape, router);
  }
  return (request, response, next) => {
    const router = byShape.get(shapeOf(request.path));
    if (router === undefined) next();
    else router(request, response, next);
  };
}

function shapeOf(path: string): string {
  const parts = path.toLowerCase().split('/');
  if (parts.at(-1) === '') parts.pop();
  // `/api/teams/:teamId/<what>/…`; every other path has a parameter at the same place or none.
  return parts[2] === 'teams' ? `${parts.length} ${parts[4] ?? ''}` : `${parts.length}`;
}
