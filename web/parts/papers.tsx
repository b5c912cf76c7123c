import { useState } from 'preact/hooks';
import type { Papers } from '../../server/contract/papers.ts';
import { paperFilePath, paperPicturePath, sendPaperPath } from '../../server/contract/record-paths.ts';
import { postBytes } from '../api.ts';
import { usePost } from '../use-post.ts';
import { useRead } from '../use-read.ts';
import { bytes } from '../words/figures.ts';
import { TextField } from './field.tsx';
import { FileButton } from './file-button.tsx';
import { Entry } from './notebook.tsx';
import { Problem } from './problem.tsx';
import { Shown } from './shown.tsx';
import { When } from './when.tsx';

/** Photographs and documents of a part or run, kept by their hash. `path` is where they are listed and sent to. */
export function PaperSection({ path }: { path: string }) {
  const reading = useRead<Papers>(path);
  const [shows, setShows] = useState('');
  const sending = usePost(async (file: File) => {
    await postBytes<Papers>(sendPaperPath(path, file.name, shows.trim()), file);
    setShows('');
    reading.again();
  });
  return (
    <section class="section">
      <h2>Photographs and documents</h2>
      <Shown reading={reading} what="Reading the photographs and documents">
        {({ papers }) =>
          papers.length === 0 ? (
            <p class="soft">None on record.</p>
          ) : (
            <ul class="entries">
              {papers.map((paper) => (
                <Entry key={paper.id} when={<When at={paper.deed.at} />}>
                  {paper.picture && (
                    <a href={paperPicturePath(paper.id)} target="_blank" rel="noreferrer">
                      <img
                        class="paper"
                        src={paperPicturePath(paper.id)}
                        alt={paper.shows ?? paper.name}
                        loading="lazy"
                      />
                    </a>
                  )}
                  <p>
                    <a href={paperFilePath(paper.id)} download={paper.name}>
                      {paper.name}
                    </a>
                    {paper.shows && `: ${paper.shows}`}
                  </p>
                  <p class="soft small breakable">
                    {bytes(paper.bytes)} · by {paper.deed.by} · SHA-256 {paper.sha256}
                  </p>
                </Entry>
              ))}
            </ul>
          )
        }
      </Shown>
      <div class="row no-print">
        <TextField label="What it shows" maxLength={400} value={shows} onValue={setShows} />
        <FileButton
          label="Add a photograph or document"
          isUnderWay={sending.isUnderWay}
          onFile={(file) => void sending.post(file)}
        />
      </div>
      {sending.problem && <Problem problem={sending.problem} kept="The file on your device is untouched." />}
    </section>
  );
}
