import { adoptRemedy } from './adopt-remedy';
import { replaceSequence, sequenceById, type BenchDocument } from './bench-document';
import { UNDO_STEPS, type BenchAction, type BenchState } from './bench-state';
import { tidyPrescription } from './prescription-edit';

/** Pointer, typed value, key → new state. Pure: the same actions always lead to the same bench. */
export function reduceBench(state: BenchState, action: BenchAction): BenchState {
  const { document } = state;
  switch (action.type) {
    case 'edit-patient':
      return edited(state, { ...document, patient: { ...document.patient, ...action.patch } }, action.step);
    case 'edit-extent': {
      const extents = { ...document.patient.extents, [action.side]: action.reading };
      return edited(state, { ...document, patient: { ...document.patient, extents } }, action.step);
    }
    case 'edit-prescription': {
      const sequence = sequenceById(document, state.activeId);
      const prescription = tidyPrescription(sequence.prescription, action.patch, document.scanner);
      return edited(state, replaceSequence(document, { ...sequence, prescription }), action.step);
    }
    case 'back-to-protocol': {
      const { id } = sequenceById(document, state.activeId);
      return edited(state, replaceSequence(document, { id, prescription: action.prescription, adopted: [] }));
    }
    case 'edit-keep-clear':
      // A newly drawn area is meant for every sequence, so what a remedy froze before no longer applies.
      return edited(
        state,
        {
          ...document,
          keepClear: action.keepClear,
          sequences: document.sequences.map(({ frozenKeepClear: _, ...sequence }) => sequence),
        },
        action.step,
      );
    case 'choose-scanner':
      return edited(state, { ...document, scanner: action.scanner });
    case 'settle':
      return state.openStep === null ? state : { ...state, openStep: null };
    case 'choose-sequence':
      if (action.id === state.activeId) return state;
      return { ...state, activeId: action.id, trial: null, openStep: null };
    case 'choose-view':
      return { ...state, view: action.view };
    case 'choose-slice':
      return { ...state, sliceIndex: { ...state.sliceIndex, [state.activeId]: action.index } };
    case 'choose-certainty':
      // What is tried was ranked at another certainty.
      return action.sureAt === state.sureAt ? state : { ...state, sureAt: action.sureAt, trial: null, openStep: null };
    case 'try':
      return { ...state, trial: { sequenceId: state.activeId, remedy: action.remedy }, openStep: null };
    case 'leave-trial':
      return state.trial === null ? state : { ...state, trial: null };
    case 'adopt':
      return edited(state, adoptRemedy(document, state.activeId, action.remedy));
    case 'undo':
      return undone(state);
    case 'redo':
      return redone(state);
    case 'mark-saved':
      return { ...state, saved: action.document };
    case 'replace-document':
      return {
        ...edited(state, action.document),
        saved: action.saved ? action.document : state.saved,
      };
  }
}

function edited(state: BenchState, document: BenchDocument, step?: string): BenchState {
  const joins = step !== undefined && step === state.openStep;
  return {
    ...state,
    document,
    trial: null,
    past: joins ? state.past : [...state.past, state.document].slice(-UNDO_STEPS),
    future: [],
    openStep: step ?? null,
  };
}

function undone(state: BenchState): BenchState {
  const before = state.past.at(-1);
  if (!before) return state;
  return {
    ...state,
    document: before,
    past: state.past.slice(0, -1),
    future: [state.document, ...state.future],
    trial: null,
    openStep: null,
  };
}

function redone(state: BenchState): BenchState {
  const after = state.future[0];
  if (!after) return state;
  return {
    ...state,
    document: after,
    past: [...state.past, state.document],
    future: state.future.slice(1),
    trial: null,
    openStep: null,
  };
}
