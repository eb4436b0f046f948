import { getSession } from '../contract/accounts.ts';
import { apiQuery } from './api-query.ts';

/** Who is signed in. Kept until a call is answered 401, or someone signs in or out (see the query client). */
export const sessionQuery = apiQuery(getSession, { params: {}, query: {} });
