import { useInfiniteQuery, useMutation } from '@tanstack/react-query';
import { Link } from 'react-router';
import { auditActions } from '../../../shared/schemas/audit.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { Button } from '../../components/ui/button.tsx';
import { Field } from '../../components/ui/field.tsx';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { sentenceOf } from '../../lib/check-form.ts';
import { formatCount } from '../../lib/format.ts';
import { saveFile } from '../../lib/save-file.ts';
import { useViewState } from '../../lib/use-view-state.ts';
import { paths } from '../../paths.ts';
import { auditQuery, readWholeAudit } from './audit.queries.ts';
import { auditCsv } from './audit-csv.ts';
import { detailText, filterAudit } from './audit-filter.ts';

const actionOptions = [
  { value: '', label: 'everything' },
  ...auditActions.map((action) => ({ value: action, label: action })),
];

const two = (value: number): string => String(value).padStart(2, '0');

/** 2026-03-14 09:12:05, in UTC: a log is read for its order. */
function formatMoment(iso: string): string {
  const date = new Date(iso);
  return `${iso.slice(0, 10)} ${two(date.getUTCHours())}:${two(date.getUTCMinutes())}:${two(date.getUTCSeconds())}`;
}

/** Who did what: narrowed by word, kind and day, and written into a file. */
export function AuditLog({ library }: { library?: string }) {
  const query = useInfiniteQuery(auditQuery(library));
  const view = useViewState();
  const filter = {
    text: view.get('text'),
    action: view.get('action'),
    from: view.get('from'),
    to: view.get('to'),
  };
  const save = useMutation({
    mutationFn: async () => {
      const entries = filterAudit(await readWholeAudit(library), filter);
      saveFile(`audit-${library ?? 'site'}.csv`, 'text/csv;charset=utf-8', auditCsv(entries));
      return entries.length;
    },
  });
  const isFiltered = Object.values(filter).some((value) => value !== '');
  return (
    <Entry
      title="Log"
      note={
        <>
          <p>Newest first. It is written together with what it tells of, and never changed.</p>
          <p>The file has everything that fits the filter, also what is not shown yet.</p>
        </>
      }
    >
      <div className="flex flex-wrap items-end gap-x-4 gap-y-2 pb-4">
        <Field
          label="Word"
          type="search"
          value={filter.text}
          onChange={(event) => view.set({ text: event.target.value })}
          className="w-[14em] max-w-full"
        />
        <SelectField
          label="What"
          options={actionOptions}
          value={filter.action}
          onChange={(action) => view.set({ action })}
        />
        <Field
          label="From"
          type="date"
          value={filter.from}
          onChange={(event) => view.set({ from: event.target.value })}
        />
        <Field
          label="To"
          type="date"
          value={filter.to}
          onChange={(event) => view.set({ to: event.target.value })}
        />
        {isFiltered && (
          <TextAction onClick={() => view.clear('text', 'action', 'from', 'to')}>Show everything</TextAction>
        )}
        <Button disabled={save.isPending} onClick={() => save.mutate()}>
          Save as CSV
        </Button>
        <span role="status" className="text-note text-ink-3">
          {save.isSuccess && `${formatCount(save.data, 'line')} saved.`}
        </span>
      </div>
      <FormAlert>{sentenceOf(save.error)}</FormAlert>
      <QueryState
        query={query}
        what="the log"
        isEmpty={(data) => data.pages[0]?.items.length === 0}
        empty={
          <StateNote title="Nothing has happened yet">What is done from now on is written here.</StateNote>
        }
      >
        {({ pages }) => {
          const all = pages.flatMap((page) => page.items);
          const shown = filterAudit(all, filter);
          return (
            <>
              <table className="table stack">
                <thead>
                  <tr>
                    <th scope="col">when</th>
                    <th scope="col">who</th>
                    <th scope="col">what</th>
                    {library === undefined && <th scope="col">library</th>}
                    <th scope="col">about</th>
                  </tr>
                </thead>
                <tbody>
                  {shown.map((entry) => (
                    <tr key={entry.id}>
                      <td className="fig text-ink-2">{formatMoment(entry.at)}</td>
                      <th scope="row">{entry.actor}</th>
                      <td>{entry.action}</td>
                      {library === undefined && (
                        <td>
                          {entry.library !== null && (
                            <Link to={paths.library(entry.library)}>{entry.library}</Link>
                          )}
                        </td>
                      )}
                      <td className="wrap-anywhere">
                        {entry.subject} <span className="text-ink-3">{detailText(entry.detail)}</span>
                      </td>
                    </tr>
                  ))}
                </tbody>
              </table>
              <div className="flex flex-wrap items-center gap-x-4 gap-y-2 pt-3">
                <span role="status" className="text-note text-ink-3">
                  {isFiltered
                    ? `${formatCount(shown.length, 'line')} of the ${formatCount(all.length, 'line')} read fit.`
                    : formatCount(all.length, 'line')}
                </span>
                {query.hasNextPage && (
                  <Button disabled={query.isFetchingNextPage} onClick={() => void query.fetchNextPage()}>
                    Read older ones
                  </Button>
                )}
              </div>
            </>
          );
        }}
      </QueryState>
    </Entry>
  );
}
