import { addCalibration } from '../actions/add-calibration.ts';
import { addAccuracyTest, addSurvey, setQualifiedRange } from '../actions/add-survey.ts';
import { placeInstrument, takeOff } from '../actions/place-instrument.ts';
import { setInstrument } from '../actions/set-instrument.ts';
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
  readDoorChecks: (parts, { params }) => doorChecks(parts, params.vessel ?? '', { load: null, cycle: null }),
  checkDoor: (parts, { params, body }) => doorChecks(parts, params.vessel ?? '', body),
};
