import { useRoute } from 'preact-iso';
import { toolPath } from '../../server/contract/paths.ts';
import type { ToolRecord } from '../../server/contract/tool-record.ts';
import type { ToolView } from '../../server/contract/tools.ts';
import { usePageTitle } from '../page-title.ts';
import { LabelLink } from '../parts/label-link.tsx';
import { Entry, Notebook, PageHead } from '../parts/notebook.tsx';
import { VerdictLine } from '../parts/outcome-mark.tsx';
import { Shown } from '../parts/shown.tsx';
import { ToolFormView } from '../parts/tool-form.tsx';
import { When } from '../parts/when.tsx';
import { useRead } from '../use-read.ts';
import { asWritten } from '../words/figures.ts';

/** One tool: what it is, and every part made on it. One that is not on record yet can be written down here. */
export default function ToolPage() {
  const { params } = useRoute();
  const code = params.tool ?? '';
  usePageTitle(`Tool ${code}`);
  const reading = useRead<ToolView>(toolPath(code));
  const isNew = reading.problem?.status === 404;
  return (
    <Notebook>
      <PageHead title={`Tool ${code}`}>
        {reading.value?.record && <p class="soft">{reading.value.record.title ?? 'What it is is not on record'}</p>}
        {reading.value && <LabelLink kind="tool" code={code} />}
      </PageHead>
      {isNew ? (
        <>
          <p>This tool is not on record yet. Keeping what it is makes it.</p>
          <ToolFormView tool={{ code, record: null, earlier: [], parts: [] }} onKept={reading.again} />
        </>
      ) : (
        <Shown reading={reading} what="Reading the tool">
          {(tool) => <Body tool={tool} again={reading.again} />}
        </Shown>
      )}
    </Notebook>
  );
}

function Body({ tool, again }: { tool: ToolView; again: () => void }) {
  const records = tool.record === null ? [] : [tool.record, ...tool.earlier];
  return (
    <>
      {tool.record ? <Facts record={tool.record} /> : <p>Nothing is on record of it but its code.</p>}
      <details class="section" open={tool.record === null}>
        <summary>{tool.record ? 'Write its record again' : 'Write down what it is'}</summary>
        <ToolFormView key={records.length} tool={tool} onKept={again} />
      </details>
      <section class="section">
        <h2>Parts made on it</h2>
        {tool.parts.length === 0 ? (
          <p class="soft">None on record.</p>
        ) : (
          <ul class="entries">
            {tool.parts.map((part) => (
              <Entry key={part.serial} when={part.lastRunAt && <When at={part.lastRunAt} />}>
                <div class="head">
                  <a href={`/parts/${encodeURIComponent(part.serial)}`}>{part.serial}</a>
                  {part.verdict ? <VerdictLine verdict={part.verdict} /> : <span class="soft">not judged yet</span>}
                </div>
                <p class="soft">{[part.title, part.drawing].filter(Boolean).join(' · ')}</p>
              </Entry>
            ))}
          </ul>
        )}
      </section>
      {records.length > 0 && (
        <section class="section">
          <h2>As it was written down</h2>
          <ul class="entries">
            {records.map((record) => (
              <Entry key={record.deed.at} when={<When at={record.deed.at} />}>
                <p class="soft">
                  by {record.deed.by}
                  {record.reason ? `: ${record.reason}` : ''}
                </p>
                <Facts record={record} />
              </Entry>
            ))}
          </ul>
        </section>
      )}
    </>
  );
}

function Facts({ record: { drawing, material, thicknessMm } }: { record: ToolRecord }) {
  return (
    <dl class="facts">
      <dt>Drawing</dt>
      <dd>{drawing ?? 'not on record'}</dd>
      <dt>Material</dt>
      <dd>
        {material === null
          ? 'not on record'
          : `${material.name}: ${asWritten(material.densityKgM3, 'kg/m³')}, ${asWritten(material.specificHeatJKgK, 'J/(kg K)')}, ${asWritten(material.conductivityWMK, 'W/(m K)')} (${material.source})`}
      </dd>
      <dt>Under the part</dt>
      <dd>{thicknessMm === null ? 'not on record' : asWritten(thicknessMm, 'mm')}</dd>
    </dl>
  );
}
