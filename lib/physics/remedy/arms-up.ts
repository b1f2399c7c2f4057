import { changed, NOTHING_TO_CHANGE, refused, type Change } from './change';

/** Arms raised out of the picture: offered only for arms that lie down, and always to be confirmed with the patient. */
export const armsUp: Change = (given) => {
  const { patient } = given;
  if (patient.arms.position === 'cannot-be-raised') {
    return refused('arms-cannot-be-raised', 'The arms cannot be raised.');
  }
  if (patient.arms.position === 'up') return NOTHING_TO_CHANGE;
  return changed(
    {
      ...given,
      patient: {
        ...patient,
        arms: { ...patient.arms, position: 'up' },
        ...(patient.parts === undefined
          ? {}
          : { parts: patient.parts.filter((part) => part.kind !== 'arm') }),
      },
    },
    'Confirm with the patient that the arms can stay raised',
    'Check the opening again with the arms raised',
  );
};
