import { Link } from 'react-router';
import type { RunDetail } from '../../../shared/schemas/runs.ts';
import { type Fact, Facts } from '../../components/sheet/facts.tsx';
import { formatCommit, formatDateTime, formatElapsed, formatFigure } from '../../lib/format.ts';

export interface RunFactsProps {
  run: RunDetail;
  buildHref: string;
  suiteHref: string;
}

export function RunFacts({ run, buildHref, suiteHref }: RunFactsProps) {
  const { environment } = run;
  const facts: Fact[] = [
    {
      term: 'build',
      value: (
        <Link to={buildHref}>
          <span className="num">{formatCommit(run.build.commit ?? run.build.label)}</span>{' '}
          {run.build.commit === null ? '' : run.build.label}
        </Link>
      ),
    },
    {
      term: 'suite',
      value: (
        <Link to={suiteHref}>
          {run.suite.slug}, revision <span className="num">{run.suite.revision}</span>
        </Link>
      ),
    },
    {
      term: run.status === 'running' ? 'evaluations so far' : 'evaluations',
      value: <span className="num">{formatFigure(run.progress.evaluations)}</span>,
    },
  ];
  if (environment !== null) {
    facts.push({
      term: 'environment',
      value: `Node.js ${environment.node.replace(/^v/, '')}, ${environment.platform} ${environment.arch}, ${environment.confinement}`,
      isLong: true,
    });
  }
  if (run.adapterText !== null && run.adapterText !== '')
    facts.push({ term: 'adapter', value: run.adapterText });
  if (run.startedAt !== null) facts.push({ term: 'started', value: formatDateTime(run.startedAt) });
  if (run.finishedAt !== null) facts.push({ term: 'took', value: formatElapsed(run.elapsedMs) });
  return <Facts facts={facts} />;
}
