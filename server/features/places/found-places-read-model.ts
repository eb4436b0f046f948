import type { Knex } from 'knex';
import type { FoundPlace } from '#contract/places.ts';
import { plainName } from '../../db/plain-name.ts';

const MOST_OWN = 6;
const MOST_PLACES = 8;
/** Trigrams need three letters; fewer are taken for a beginning. */
const LEAST_LETTERS = 3;

/** The team's own stations and sites whose name holds the text, those that begin with it first; none of a closed programme. */
export async function findOwnPlaces(
  db: Knex,
  asked: { teamId: string; text: string; closed: readonly string[] },
): Promise<FoundPlace[]> {
  const part = `%${likeText(asked.text)}%`;
  const { rows } = await db.raw<{ rows: FoundPlace[] }>(
    `select * from (
       select 'station' as kind, id, null::uuid as "programmeId", name, null as country, latitude, longitude
       from stations where team_id = :teamId and name ilike :part
       union all
       select 'site', id, programme_id, name, null, latitude, longitude
       from sites
       where team_id = :teamId and removed_at is null and not programme_id = any(:closed::uuid[]) and name ilike :part
     ) as own
     order by name ilike :beginning desc, name, id
     limit :most`,
    { teamId: asked.teamId, closed: [...asked.closed], part, beginning: part.slice(1), most: MOST_OWN },
  );
  return rows;
}

/** Places of the gazetteer whose name is like the text, the likest and largest first. */
export async function findGazetteerPlaces(db: Knex, text: string): Promise<FoundPlace[]> {
  const comma = text.indexOf(',');
  const plain = plainName(comma < 0 ? text : text.slice(0, comma));
  const country = comma < 0 ? '' : text.slice(comma + 1).trim();
  if (plain === '') return [];
  const beginning = `${likeText(plain)}%`;
  const like = plain.length < LEAST_LETTERS ? 'plain like :beginning' : '(plain like :part or plain % :plain)';
  const { rows } = await db.raw<{ rows: FoundPlace[] }>(
    `select kind, null::uuid as id, null::uuid as "programmeId", name, country, latitude, longitude
     from gazetteer
     where ${like} and country ilike :country
     order by (plain = :plain) desc, (plain like :beginning) desc,
       similarity(plain, :plain) + ln(population + 1) / 15 desc, name, latitude
     limit :most`,
    { plain, beginning, part: `%${beginning}`, country: `${likeText(country)}%`, most: MOST_PLACES },
  );
  return rows;
}

/** Text that stands for itself in a pattern of LIKE. */
function likeText(text: string): string {
  return text.replace(/[\\%_]/g, (sign) => `\\${sign}`);
}
