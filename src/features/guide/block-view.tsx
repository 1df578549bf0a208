import type { Block, Table } from '../../../shared/guide/section.ts';
import { CodeBlock } from './code-block.tsx';
import { SpanText } from './span-text.tsx';

export interface BlockViewProps {
  block: Block;
}

function TableView({ block }: { block: Table }) {
  return (
    <table className="table stack guide-table my-3 max-w-[100ch]">
      <caption className="sr-only">{block.caption}</caption>
      <thead>
        <tr>
          {block.columns.map((column) => (
            <th key={column} scope="col">
              {column}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {block.rows.map(([first = '', ...cells], index) => (
          // biome-ignore lint/suspicious/noArrayIndexKey: the rows of a table keep their places
          <tr key={index}>
            <th scope="row" className="whitespace-normal! align-top!">
              <SpanText text={first} />
            </th>
            {cells.map((cell, place) => (
              <td key={block.columns[place + 1]} className="align-top!" data-label={block.columns[place + 1]}>
                <SpanText text={cell} />
              </td>
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

/** One block of a chapter: a paragraph, a list, a table or code. */
export function BlockView({ block }: BlockViewProps) {
  switch (block.kind) {
    case 'paragraph':
      return (
        <p className="my-2 max-w-[72ch] text-lead first:mt-0">
          <SpanText text={block.text} />
        </p>
      );
    case 'list': {
      const List = block.numbered ? 'ol' : 'ul';
      return (
        <List
          className={`my-2 max-w-[72ch] pl-5 text-lead marker:text-ink-3 ${block.numbered ? 'list-decimal' : 'list-disc'}`}
        >
          {block.items.map((item) => (
            <li key={item} className="mb-1 pl-1">
              <SpanText text={item} />
            </li>
          ))}
        </List>
      );
    }
    case 'table':
      return <TableView block={block} />;
    case 'code':
      return <CodeBlock language={block.language} text={block.text} />;
  }
}
