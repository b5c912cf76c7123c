import { useState } from 'preact/hooks';
import { useLocation } from 'preact-iso';
import { TOOLS_PATH } from '../../server/contract/paths.ts';
import type { ToolLine, Tools } from '../../server/contract/tools.ts';
import { usePageTitle } from '../page-title.ts';
import { TextField } from '../parts/field.tsx';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { Shown } from '../parts/shown.tsx';
import { useRead } from '../use-read.ts';
import { asWritten, count } from '../words/figures.ts';

/** Every tool a lay-up or a load has named, and what is known of it. */
export default function ToolsPage() {
  usePageTitle('Tools');
  const reading = useRead<Tools>(TOOLS_PATH);
  const { route } = useLocation();
  const [code, setCode] = useState('');
  const open = (event: Event) => {
    event.preventDefault();
    if (code.trim() !== '') route(`/tools/${encodeURIComponent(code.trim())}`);
  };
  return (
    <Notebook>
      <PageHead title="Tools">
        <p class="soft">A tool comes on record when a lay-up or a load names it, or when it is opened here.</p>
      </PageHead>
      <form class="row filters" onSubmit={open}>
        <TextField label="Code of a tool" maxLength={120} value={code} onValue={setCode} />
        <button type="submit">Open</button>
      </form>
      <Shown reading={reading} what="Reading the tools">
        {({ tools }) =>
          tools.length === 0 ? (
            <div class="empty">
              <h2>No tool is on record yet</h2>
              <p>Type the code that stands on one and write down its material and thickness.</p>
            </div>
          ) : (
            <ul class="entries section">
              {tools.map((tool) => (
                <ToolEntry key={tool.code} tool={tool} />
              ))}
            </ul>
          )
        }
      </Shown>
    </Notebook>
  );
}

function ToolEntry({ tool: { code, record, parts } }: { tool: ToolLine }) {
  const said = [
    record?.title,
    record?.material?.name ?? 'material not on record',
    record?.thicknessMm == null ? 'thickness not on record' : `${asWritten(record.thicknessMm, 'mm')} under the part`,
  ];
  return (
    <li class="entry">
      <div class="head">
        <a href={`/tools/${encodeURIComponent(code)}`}>{code}</a>
        <span class="soft">{parts === 0 ? 'no part made on it' : `${count(parts, 'part')} made on it`}</span>
      </div>
      <p class="soft">{said.filter(Boolean).join(' · ')}</p>
    </li>
  );
}
