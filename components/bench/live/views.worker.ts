import { expose, transfer } from 'comlink';
import { foldProbability, simulateImage, toGreyLevels, type FoldProbability } from '@/lib/physics';
import type { Case } from '@/lib/physics/model/case';
import { fitWhite } from '../picture/fit-white';
import type { AskedPicture, PaintedPicture } from '../picture/painted-picture';
import { refusalOf } from './results';

/** What is only looked at, apart from the engine's own Worker: a ranking never waits for a picture. */
const views = {
  picture(asked: AskedPicture): PaintedPicture {
    try {
      const { values, ...picture } = simulateImage(asked.question, asked);
      const levels = toGreyLevels(asked.fitWhite ? fitWhite(values) : values);
      return transfer({ ...picture, levels }, [levels.buffer]);
    } catch (error) {
      return { refusal: refusalOf(error) };
    }
  },
  foldProbability(question: Case): FoldProbability | null {
    try {
      return foldProbability(question);
    } catch (error) {
      refusalOf(error); // A refused value is told beside the verdict; anything else goes on up.
      return null;
    }
  },
};

export type ViewsWorker = typeof views;

expose(views);
