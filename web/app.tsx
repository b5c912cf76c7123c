import { useEffect } from 'preact/hooks';
import { ErrorBoundary, LocationProvider, lazy, Route, Router } from 'preact-iso';
import { AuditPage } from './pages/audit.tsx';
import { CyclesPage } from './pages/cycles.tsx';
import { FindPage } from './pages/find.tsx';
import { ImportPage } from './pages/import.tsx';
import { NowPage } from './pages/now.tsx';
import { NowherePage } from './pages/nowhere.tsx';
import { PartPage } from './pages/part.tsx';
import { PartsPage } from './pages/parts.tsx';
import { RecorderPage, RecordersPage } from './pages/recorders.tsx';
import { ResinsPage } from './pages/resins.tsx';
import { RunsPage } from './pages/runs.tsx';
import { WorkshopPage } from './pages/workshop.tsx';
import { Cautions } from './parts/cautions.tsx';
import { Masthead } from './parts/masthead.tsx';
import { readWorkshop } from './workshop.ts';

const LivePage = lazy(() => import('./pages/live.tsx'));
const VesselPage = lazy(() => import('./pages/vessel.tsx'));
const BeginPage = lazy(() => import('./pages/begin.tsx'));
const WarningsPage = lazy(() => import('./pages/warnings.tsx'));
const RunPage = lazy(() => import('./pages/run.tsx'));
const LoadPage = lazy(() => import('./pages/load.tsx'));
const ReadAgainPage = lazy(() => import('./pages/read-again.tsx'));
const ImportFilePage = lazy(() => import('./pages/import-file.tsx'));
const CyclePage = lazy(() => import('./pages/cycle.tsx'));
const MaterialsPage = lazy(() => import('./pages/materials.tsx'));
const MaterialPage = lazy(() => import('./pages/material.tsx'));
const RollPage = lazy(() => import('./pages/roll.tsx'));
const CycleImportPage = lazy(() => import('./pages/cycle-import.tsx'));
const LayupPage = lazy(() => import('./pages/layup.tsx'));
const ToolsPage = lazy(() => import('./pages/tools.tsx'));
const ToolPage = lazy(() => import('./pages/tool.tsx'));
const TableImportPage = lazy(() => import('./pages/table-import.tsx'));
const LabelsPage = lazy(() => import('./pages/labels.tsx'));
const TracePage = lazy(() => import('./pages/trace.tsx'));
const HoldPage = lazy(() => import('./pages/hold.tsx'));
const ComparePage = lazy(() => import('./pages/compare.tsx'));
const InstrumentsPage = lazy(() => import('./pages/instruments.tsx'));
const InstrumentPage = lazy(() => import('./pages/instrument.tsx'));
const AskPage = lazy(() => import('./pages/ask.tsx'));
const ResinPage = lazy(() => import('./pages/resin.tsx'));

export function App() {
  useEffect(() => void readWorkshop(), []);
  return (
    <LocationProvider>
      <a class="skip" href="#page">
        Skip to the page
      </a>
      <div class="sheet">
        <Masthead />
        <main id="page" tabIndex={-1}>
          <ErrorBoundary>
            <Router onRouteChange={beginPage}>
              <Route path="/" component={NowPage} />
              <Route path="/live" component={LivePage} />
              <Route path="/warnings" component={WarningsPage} />
              <Route path="/vessels/:vessel" component={VesselPage} />
              <Route path="/vessels/:vessel/begin" component={BeginPage} />
              <Route path="/import" component={ImportPage} />
              <Route path="/imports/:id" component={ImportFilePage} />
              <Route path="/runs" component={RunsPage} />
              <Route path="/runs/:run" component={RunPage} />
              <Route path="/runs/:run/load" component={LoadPage} />
              <Route path="/runs/:run/sources/:source" component={ReadAgainPage} />
              <Route path="/parts" component={PartsPage} />
              <Route path="/parts/import" component={TableImportPage} />
              <Route path="/rolls/import" component={TableImportPage} />
              <Route path="/parts/:serial" component={PartPage} />
              <Route path="/parts/:serial/layup" component={LayupPage} />
              <Route path="/labels" component={LabelsPage} />
              <Route path="/trace" component={TracePage} />
              <Route path="/trace/holds/:hold" component={HoldPage} />
              <Route path="/trace/compare" component={ComparePage} />
              <Route path="/tools" component={ToolsPage} />
              <Route path="/tools/:tool" component={ToolPage} />
              <Route path="/instruments" component={InstrumentsPage} />
              <Route path="/instruments/:instrument" component={InstrumentPage} />
              <Route path="/ask" component={AskPage} />
              <Route path="/materials" component={MaterialsPage} />
              <Route path="/materials/:code" component={MaterialPage} />
              <Route path="/rolls/:item" component={RollPage} />
              <Route path="/kits/:item" component={RollPage} />
              <Route path="/cycles" component={CyclesPage} />
              <Route path="/cycles/import" component={CycleImportPage} />
              <Route path="/cycles/:code/:issue" component={CyclePage} />
              <Route path="/resins" component={ResinsPage} />
              <Route path="/resins/:code" component={ResinPage} />
              <Route path="/recorders" component={RecordersPage} />
              <Route path="/recorders/:name" component={RecorderPage} />
              <Route path="/audit" component={AuditPage} />
              <Route path="/find" component={FindPage} />
              <Route path="/workshop" component={WorkshopPage} />
              <Route default component={NowherePage} />
            </Router>
          </ErrorBoundary>
        </main>
        <Cautions />
      </div>
    </LocationProvider>
  );
}

/** A new page begins at its top, for the keyboard as for the eye. */
function beginPage(): void {
  document.getElementById('page')?.focus({ preventScroll: true });
}
