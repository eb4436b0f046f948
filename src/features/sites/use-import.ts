import { useQueryClient } from '@tanstack/react-query';
import { useRef, useState } from 'react';
import {
  addSiteImportRows,
  checkSiteImport,
  finishSiteImport,
  listSiteImports,
  type SiteImport,
  type SiteImportCheck,
  startSiteImport,
} from '../../contract/site-imports.ts';
import { listSites } from '../../contract/sites.ts';
import { call } from '../../lib/api-client.ts';
import { apiKey } from '../../lib/api-query.ts';
import type { ProgrammeKey } from './site-queries.ts';
import { portionsOf, type RowOfTable } from './table-draft.ts';

export type ImportState =
  | { readonly kind: 'idle' }
  | { readonly kind: 'sending'; readonly sent: number; readonly rows: number }
  | { readonly kind: 'checked'; readonly importId: string; readonly check: SiteImportCheck }
  | { readonly kind: 'finishing'; readonly importId: string; readonly check: SiteImportCheck }
  | { readonly kind: 'done'; readonly done: SiteImport }
  | { readonly kind: 'failed'; readonly error: unknown };

/** Sends a table in portions, has it checked whole, and finishes it once the person has seen what was found. */
export function useImport(programme: ProgrammeKey) {
  const client = useQueryClient();
  const [state, setState] = useState<ImportState>({ kind: 'idle' });
  const stop = useRef<AbortController | null>(null);

  async function send(name: string, rows: readonly RowOfTable[]): Promise<void> {
    const stopping = new AbortController();
    stop.current = stopping;
    const { signal } = stopping;
    try {
      setState({ kind: 'sending', sent: 0, rows: rows.length });
      const { id } = await call(startSiteImport, { params: { ...programme }, query: {}, body: { name } }, { signal });
      const params = { ...programme, importId: id };
      let sent = 0;
      for (const portion of portionsOf(rows)) {
        await call(
          addSiteImportRows,
          { params, query: {}, body: { rows: portion.map((row) => ({ ...row })) } },
          { signal },
        );
        sent += portion.length;
        setState({ kind: 'sending', sent, rows: rows.length });
      }
      setState({
        kind: 'checked',
        importId: id,
        check: await call(checkSiteImport, { params, query: {} }, { signal }),
      });
    } catch (error) {
      setState(signal.aborted ? { kind: 'idle' } : { kind: 'failed', error });
    }
  }

  async function finish(duplicates: 'skip' | 'keep'): Promise<void> {
    if (state.kind !== 'checked') return;
    const { importId } = state;
    try {
      setState({ ...state, kind: 'finishing' });
      const params = { ...programme, importId };
      setState({ kind: 'done', done: await call(finishSiteImport, { params, query: {}, body: { duplicates } }) });
    } catch (error) {
      setState({ kind: 'failed', error });
    } finally {
      for (const endpoint of [listSites, listSiteImports]) client.invalidateQueries({ queryKey: apiKey(endpoint) });
    }
  }

  function reset(): void {
    stop.current?.abort();
    setState({ kind: 'idle' });
  }

  return { state, send, finish, reset };
}
