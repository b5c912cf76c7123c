import { useLocation } from 'preact-iso';
import { usePageTitle } from '../page-title.ts';
import { Notebook, PageHead } from '../parts/notebook.tsx';

export function NowherePage() {
  const { path } = useLocation();
  usePageTitle('No such page');
  return (
    <Notebook>
      <PageHead title="There is no page at this address" />
      <div class="empty">
        <p class="breakable">
          Nothing in this book stands at <code>{path}</code>. It may have been typed wrongly.
        </p>
        <p>
          Scan or type a code in the box above, or begin at <a href="/">Now in the shop</a>.
        </p>
      </div>
    </Notebook>
  );
}
