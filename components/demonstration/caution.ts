/** Under every scene that leaves the room: on a shared page and on a hand-out. */
export const SHOWN_CAUTION =
  'Invented cases for teaching. A planning aid: trained staff, implant screening, equipment labelling and local policy decide.';
