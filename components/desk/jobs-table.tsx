'use client';

import Link from 'next/link';
import { useMemo, useState } from 'react';
import type { DeskJobRow } from '@/lib/contracts/desk';
import { JOB_STAGE_NAMES, JOB_STAGES } from '@/lib/contracts/states';
import { Money } from '@/components/ui/money';
import { paths } from '@/lib/paths';

type Column = 'number' | 'name' | 'stage' | 'salesperson' | 'sum';

const COLUMNS: readonly { key: Column; label: string; numeric?: boolean }[] = [
  { key: 'number', label: 'No.', numeric: true },
  { key: 'name', label: 'Job' },
  { key: 'stage', label: 'Stage' },
  { key: 'salesperson', label: 'Salesperson' },
  { key: 'sum', label: 'Sum', numeric: true },
];

function compare(a: DeskJobRow, b: DeskJobRow, by: Column): number {
  switch (by) {
    case 'number':
      return a.number - b.number;
    case 'name':
      return a.name.localeCompare(b.name);
    case 'stage':
      return JOB_STAGES.indexOf(a.stage) - JOB_STAGES.indexOf(b.stage);
    case 'salesperson':
      return a.salesperson.localeCompare(b.salesperson);
    case 'sum':
      return (a.sumCents ?? 0) - (b.sumCents ?? 0);
  }
}

/** The desk's list of jobs: sorted by any column, filtered by words. */
export function JobsTable({ company, rows }: { company: string; rows: readonly DeskJobRow[] }) {
  const [sort, setSort] = useState<{ by: Column; down: boolean }>({ by: 'number', down: true });
  const [words, setWords] = useState('');
  const shown = useMemo(() => {
    const wanted = words.toLowerCase().split(/\s+/).filter(Boolean);
    const matches = (row: DeskJobRow) => {
      const text = `${row.number} ${row.name} ${row.address} ${row.salesperson} ${JOB_STAGE_NAMES[row.stage]}`;
      return wanted.every((word) => text.toLowerCase().includes(word));
    };
    return rows.filter(matches).sort((a, b) => compare(a, b, sort.by) * (sort.down ? -1 : 1));
  }, [rows, sort, words]);

  return (
    <div>
      <label className="mb-3 block max-w-sm">
        <span className="block text-note text-quiet">Find a job</span>
        <input
          type="search"
          value={words}
          onChange={(event) => setWords(event.target.value)}
          className="min-h-11 w-full rounded-frame border border-ink/40 bg-panel px-3 text-reading"
        />
      </label>
      <p className="sr-only" aria-live="polite">
        {shown.length} of {rows.length} jobs
      </p>
      <div className="overflow-x-auto">
        <table className="w-full border-collapse text-reading">
          <thead className="sticky top-0 bg-panel">
            <tr>
              {COLUMNS.map((column) => {
                const sorted = sort.by === column.key;
                return (
                  <th
                    key={column.key}
                    scope="col"
                    aria-sort={sorted ? (sort.down ? 'descending' : 'ascending') : 'none'}
                    className={`border-b border-ink/50 ${column.numeric ? 'text-right' : 'text-left'}`}
                  >
                    <button
                      type="button"
                      className="min-h-11 px-2 text-note font-semibold text-quiet hover:text-ink"
                      onClick={() => setSort({ by: column.key, down: sorted ? !sort.down : false })}
                    >
                      {column.label}
                      <span aria-hidden="true">{sorted ? (sort.down ? ' ▾' : ' ▴') : ''}</span>
                    </button>
                  </th>
                );
              })}
              <th
                scope="col"
                className="border-b border-ink/50 px-2 text-left text-note font-semibold text-quiet"
              >
                Next
              </th>
            </tr>
          </thead>
          <tbody>
            {shown.map((row) => (
              <tr key={row.id} className="border-b border-hairline align-baseline">
                <td className="px-2 py-3 text-right tabular-nums">{row.number}</td>
                <td className="min-w-44 px-2 py-3">
                  <Link
                    href={paths.deskJob(company, row.id)}
                    className="font-semibold text-brand underline underline-offset-4"
                  >
                    {row.name}
                  </Link>
                  <div className="text-note text-quiet">{row.address}</div>
                </td>
                <td className="px-2 py-3 whitespace-nowrap">{JOB_STAGE_NAMES[row.stage]}</td>
                <td className="px-2 py-3 whitespace-nowrap">{row.salesperson}</td>
                <td className="px-2 py-3 text-right whitespace-nowrap">
                  {row.sumCents === null ? (
                    <span className="text-quiet">none yet</span>
                  ) : (
                    <>
                      <Money cents={row.sumCents} />
                      <div className="text-note text-quiet">{row.signed ? 'signed' : 'estimate'}</div>
                    </>
                  )}
                </td>
                <td className="min-w-56 px-2 py-3">{row.nextStep}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {shown.length === 0 && (
        <p className="py-6 text-quiet">
          {rows.length === 0
            ? 'There is no job yet. A survey brought in from a file opens the first one.'
            : 'No job matches these words.'}
        </p>
      )}
    </div>
  );
}
