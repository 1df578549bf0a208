import { exportCsv } from '../../../shared/comparison/export-csv.ts';
import { exportJson } from '../../../shared/comparison/export-json.ts';
import { exportJUnit } from '../../../shared/comparison/export-junit.ts';
import { exportMarkdown } from '../../../shared/comparison/export-markdown.ts';
import type { ExportFormat, ExportQuery } from '../../../shared/schemas/comparisons.ts';
import type { AllowancesService } from '../allowances/allowances.service.ts';
import type { ComparisonsService, LoadedComparison } from './comparisons.service.ts';

export interface ExportFile {
  /** Letters, digits, hyphens and one dot. */
  name: string;
  mediaType: string;
  text: string;
}

const formats: Record<ExportFormat, { ending: string; mediaType: string }> = {
  csv: { ending: 'csv', mediaType: 'text/csv; charset=utf-8; header=present' },
  json: { ending: 'json', mediaType: 'application/json; charset=utf-8' },
  markdown: { ending: 'md', mediaType: 'text/markdown; charset=utf-8' },
  junit: { ending: 'xml', mediaType: 'application/xml; charset=utf-8' },
};

/** Comparisons as files for other programs. */
export function createExportsService(deps: {
  comparisons: ComparisonsService;
  allowances: AllowancesService;
}) {
  function write(format: ExportFormat, loaded: LoadedComparison): string {
    const { comparison, library, allowances } = loaded;
    if (format === 'csv') return exportCsv(comparison);
    if (format === 'markdown') return exportMarkdown(comparison);
    if (format === 'junit') return exportJUnit(comparison);
    return exportJson(comparison, deps.allowances.get(library, allowances).allowances);
  }
  return {
    make(query: ExportQuery): ExportFile {
      const loaded = deps.comparisons.load(query);
      const { ending, mediaType } = formats[query.format];
      const against =
        query.reference === undefined ? `reference-${query.revision}` : `run-${query.reference}`;
      const words = [loaded.library, loaded.suite, `run-${query.candidate}`, 'against', against];
      const name = words.join('-').replace(/[^A-Za-z0-9-]/g, '-');
      return { name: `${name}.${ending}`, mediaType, text: write(query.format, loaded) };
    },
  };
}

export type ExportsService = ReturnType<typeof createExportsService>;
