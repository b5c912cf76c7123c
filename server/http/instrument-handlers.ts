import type { Calibration } from '../../models/run/instrument-records.ts';
import { addCalibration } from '../actions/add-calibration.ts';
import { addAccuracyTest, addSurvey, setQualifiedRange } from '../actions/add-survey.ts';
import { placeInstrument, takeOff } from '../actions/place-instrument.ts';
import { instrumentsOfRun } from '../actions/run-inputs.ts';
import { setInstrument } from '../actions/set-instrument.ts';
import { requireRun } from '../store/runs.ts';
import { doorChecks } from './door-checks.ts';
import type { SomeHandlers } from './handler.ts';
import { instrumentsView, instrumentView, vesselSurveysView } from './instrument-view.ts';
import { numberIn } from './number-in.ts';

export const instrumentHandlers: SomeHandlers<
  | 'listInstruments'
  | 'setInstrument'
  | 'readInstrument'
  | 'addCalibration'
  | 'placeInstrument'
  | 'takeOffInstrument'
  | 'readSurveys'
  | 'addSurvey'
  | 'addAccuracyTest'
  | 'setQualifiedRange'
  | 'readRunInstruments'
  | 'readDoorChecks'
  | 'checkDoor'
> = {
  listInstruments: ({ db, clock }) => instrumentsView(db, clock()),
  setInstrument(parts, { body }) {
    setInstrument(parts, body);
    return instrumentView(parts.db, body.instrument, parts.clock());
  },
  readInstrument: ({ db, clock }, { params }) => instrumentView(db, params.instrument ?? '', clock()),
  addCalibration(parts, { params, body }) {
    const { instrument = '' } = params;
    addCalibration(parts, instrument, body);
    return instrumentView(parts.db, instrument, parts.clock());
  },
  placeInstrument(parts, { params, body }) {
    const { instrument = '' } = params;
    placeInstrument(parts, instrument, body);
    return instrumentView(parts.db, instrument, parts.clock());
  },
  takeOffInstrument(parts, { params, body }) {
    const { instrument = '' } = params;
    takeOff(parts, instrument, numberIn(params, 'place'), body);
    return instrumentView(parts.db, instrument, parts.clock());
  },
  readSurveys: ({ db, clock }, { params }) => vesselSurveysView(db, params.vessel ?? '', clock()),
  addSurvey(parts, { params, body }) {
    const { vessel = '' } = params;
    addSurvey(parts, vessel, body);
    return vesselSurveysView(parts.db, vessel, parts.clock());
  },
  addAccuracyTest(parts, { params, body }) {
    const { vessel = '' } = params;
    addAccuracyTest(parts, vessel, body);
    return vesselSurveysView(parts.db, vessel, parts.clock());
  },
  setQualifiedRange(parts, { params, body }) {
    const { vessel = '' } = params;
    setQualifiedRange(parts, vessel, body);
    return vesselSurveysView(parts.db, vessel, parts.clock());
  },
  readRunInstruments({ db }, { params }) {
    const run = numberIn(params, 'run');
    requireRun(db, run);
    const channels = instrumentsOfRun(db, run)?.channels ?? [];
    return {
      channels: channels.map(({ calibration, ...one }) => ({
        ...one,
        calibration: calibration === null ? null : heldThen(calibration),
      })),
    };
  },
  readDoorChecks: (parts, { params }) => doorChecks(parts, params.vessel ?? '', { load: null, cycle: null }),
  checkDoor: (parts, { params, body }) => doorChecks(parts, params.vessel ?? '', body),
};

function heldThen({ done, until, certificate, unit, points, uncertainty }: Calibration) {
  return { done, until, certificate, unit, points: points.map(([at, by]): [number, number] => [at, by]), uncertainty };
}
