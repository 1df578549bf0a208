import type { BuildPreviewView, BuildView } from '../../../shared/schemas/builds.ts';
import { type Fact, Facts } from '../../components/sheet/facts.tsx';

export interface SourceFactsProps {
  source: Pick<
    BuildPreviewView | BuildView,
    'source' | 'address' | 'ref' | 'commit' | 'subject' | 'contentHash'
  >;
  more?: readonly Fact[];
}

const sourceWords = {
  git: 'a repository',
  archive: 'an archive',
  folder: 'a folder of this machine',
} as const;

/** Where a build comes from, as exactly as that is known. */
export function SourceFacts({ source, more = [] }: SourceFactsProps) {
  const facts: Fact[] = [{ term: 'comes from', value: sourceWords[source.source] }];
  if (source.address !== null)
    facts.push({ term: 'repository', value: <span className="num">{source.address}</span>, isLong: true });
  if (source.ref !== null)
    facts.push({ term: 'asked for', value: <span className="num">{source.ref}</span> });
  if (source.commit !== null)
    facts.push({ term: 'commit', value: <span className="num">{source.commit}</span>, isLong: true });
  if (source.subject !== null && source.subject !== '')
    facts.push({ term: 'its first line', value: source.subject, isLong: true });
  if (source.contentHash !== null)
    facts.push({
      term: 'contents, SHA-256',
      value: <span className="num">{source.contentHash}</span>,
      isLong: true,
    });
  if (source.source === 'folder' && source.commit === null)
    facts.push({ term: 'commit', value: 'none: the folder is no clean checkout' });
  return <Facts facts={[...facts, ...more]} />;
}
