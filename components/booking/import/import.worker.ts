import { expose } from 'comlink';
import { importServer } from './import-server';
import { ImportSession } from './import-session';

/** A file is read here and nowhere else: what is not mapped never reaches the page, let alone the server. */
const session = new ImportSession(importServer);

export type ImportWorker = ImportSession;

expose(session);
