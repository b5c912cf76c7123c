import { useRoute } from 'preact-iso';
import { RECORDERS_PATH, recorderPath } from '../../server/contract/paths.ts';
import type { KeptLayout, Recorder, Recorders } from '../../server/contract/recorders.ts';
import { usePageTitle } from '../page-title.ts';
import { LayoutWords } from '../parts/layout-words.tsx';
import { Entry, Notebook, PageHead } from '../parts/notebook.tsx';
import { Shown } from '../parts/shown.tsx';
import { When } from '../parts/when.tsx';
import { useRead } from '../use-read.ts';
import { count } from '../words/figures.ts';

/** Recorders, and the layout each one's files are read by. */
export function RecordersPage() {
  usePageTitle('Recorders');
  const reading = useRead<Recorders>(RECORDERS_PATH);
  return (
    <Notebook>
      <PageHead title="Recorders">
        <p class="soft">
          A recorder writes its files always in the same way. Its layout is kept from the first file that was read, so
          that the next one needs no questions.
        </p>
      </PageHead>
      <Shown reading={reading} what="Reading the recorders">
        {({ recorders }) =>
          recorders.length === 0 ? (
            <div class="empty">
              <h2>No recorder is known yet</h2>
              <p>Import one of its files and keep the layout under the recorder’s name.</p>
              <a class="button" href="/import">
                Import a log
              </a>
            </div>
          ) : (
            <ul class="entries">
              {recorders.map((recorder) => (
                <Entry key={recorder.name} when={recorder.layout && <When at={recorder.layout.kept.at} />}>
                  <div class="head">
                    <a href={`/recorders/${encodeURIComponent(recorder.name)}`}>{recorder.name}</a>
                    <span class="soft">{recorder.vessel ?? 'of no named vessel'}</span>
                    <span class="soft">{count(recorder.runs, 'run')}</span>
                  </div>
                  <p class="soft">
                    {recorder.layout
                      ? `${count(recorder.layout.document.channels.length, 'channel')}: ${recorder.layout.document.channels.map((c) => c.name).join(', ')}`
                      : 'No layout is kept yet; its next file is asked about.'}
                  </p>
                </Entry>
              ))}
            </ul>
          )
        }
      </Shown>
    </Notebook>
  );
}

export function RecorderPage() {
  const { params } = useRoute();
  const name = params.name ?? '';
  usePageTitle(`Recorder ${name}`);
  const reading = useRead<Recorder>(recorderPath(name));
  return (
    <Notebook>
      <PageHead title={name}>
        <p class="soft">
          Recorder{reading.value?.vessel ? ` of ${reading.value.vessel}` : ''}
          {reading.value ? ` · ${count(reading.value.runs, 'run')}` : ''}
        </p>
      </PageHead>
      <Shown reading={reading} what="Reading the recorder">
        {(recorder) => <Layouts recorder={recorder} />}
      </Shown>
    </Notebook>
  );
}

function Layouts({ recorder }: { recorder: Recorder }) {
  if (!recorder.layout) {
    return (
      <div class="empty">
        <p>No layout is kept for it. Import one of its files and keep the layout under its name.</p>
        <a class="button" href="/import">
          Import a log
        </a>
      </div>
    );
  }
  return (
    <>
      <section>
        <h2>Layout its files are read by</h2>
        <Kept kept={recorder.layout} />
      </section>
      {recorder.earlierLayouts.length > 0 && (
        <section class="section">
          <h2>Layouts it was read by before</h2>
          {recorder.earlierLayouts.map((kept) => (
            <details key={kept.sha256}>
              <summary>
                <When at={kept.kept.at} /> by {kept.kept.by}
              </summary>
              <Kept kept={kept} />
            </details>
          ))}
        </section>
      )}
    </>
  );
}

function Kept({ kept }: { kept: KeptLayout }) {
  return (
    <>
      <p class="soft">
        Kept <When at={kept.kept.at} /> by {kept.kept.by} · <code>{kept.sha256.slice(0, 16)}</code>
      </p>
      <LayoutWords layout={kept.document} />
    </>
  );
}
