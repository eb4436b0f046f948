import type { Router } from 'express';
import { findPlaces } from '#contract/places.ts';
import type { Deps } from '../../deps.ts';
import { closedTo } from '../../http/closed-to.ts';
import { mount } from '../../http/mount.ts';
import { findGazetteerPlaces, findOwnPlaces } from './found-places-read-model.ts';

export function placesRoutes(router: Router, deps: Deps): void {
  const { db } = deps;
  mount(router, deps, findPlaces, async ({ params: { teamId }, query: { text } }, { actor }) => {
    const [own, gazetteer] = await Promise.all([
      findOwnPlaces(db, { teamId, text, closed: closedTo(actor) }),
      findGazetteerPlaces(db, text),
    ]);
    return { places: [...own, ...gazetteer] };
  });
}
