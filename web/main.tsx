import '@fontsource-variable/atkinson-hyperlegible-next/wght.css';
import './style/tokens.css';
import './style/base.css';
import './style/layout.css';
import './style/entries.css';
import './style/controls.css';
import './style/outcome.css';
import './style/run.css';
import './style/chart.css';
import './style/import.css';
import './style/load.css';
import './style/cycle.css';
import './style/print.css';
import { render } from 'preact';
import { App } from './app.tsx';
import { followScheme } from './scheme.ts';

followScheme();
render(<App />, document.getElementById('app') as HTMLElement);
