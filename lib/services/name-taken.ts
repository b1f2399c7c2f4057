import { invalidField, type ServiceError } from '@/lib/domain/errors';

export function nameTaken(path: string, name: string): ServiceError {
  return invalidField(path, `“${name}” is taken; allowed: a name no other one of this site has`);
}

/** PostgreSQL's code for a unique constraint that was hit. */
const UNIQUE_VIOLATION = '23505';

/** Two people can choose one name in the same moment: the constraint decides, and the later one is told in words. */
export async function orNameTaken<T>(path: string, name: string, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if ((error as { code?: unknown }).code === UNIQUE_VIOLATION) throw nameTaken(path, name);
    throw error;
  }
}
