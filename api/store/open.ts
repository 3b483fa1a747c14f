/** Opens the store of a data folder: the one file, held by one service at a time, in the newest form. */
import { mkdirSync, statSync } from "node:fs";
import { join } from "node:path";
import Database from "better-sqlite3";
import { Kysely, Migrator, SqliteDialect } from "kysely";
import { type DoorError, notStarted } from "../errors.ts";
import { APPLICATION_ID, migrations, type Tables } from "./tables.ts";

/** The store's file in the data folder. */
export const storeFile = "emberturn.sqlite";

/** Another service that is just ending is waited for this long, ms. */
const patience = 1000;

/**
 * Opens the folder's store, and makes folder and store where there are none.
 * @throws DoorError in words when the folder cannot be written, another service holds the store, or the file is damaged, none of
 * ours, or of a newer emberturn. Then nothing has been written.
 */
export async function openDatabase(folder: string): Promise<Kysely<Tables>> {
  const file = join(folder, storeFile);
  const database = held(folder, file);
  const db = new Kysely<Tables>({ dialect: new SqliteDialect({ database }) });
  try {
    await migrate(db, file);
    return db;
  } catch (error) {
    await db.destroy();
    throw error;
  }
}

/** The file, opened, checked and locked. */
function held(folder: string, file: string): Database.Database {
  let database: Database.Database | undefined;
  try {
    mkdirSync(folder, { recursive: true });
    refuseBeheaded(file);
    database = new Database(file, { timeout: patience });
    // Set before the file is first read: from then on the lock is kept, and no second service gets in.
    database.pragma("locking_mode = EXCLUSIVE");
    const fresh = checkedIdentity(database, file) === 0;
    database.pragma("journal_mode = WAL");
    database.pragma("synchronous = FULL");
    database.pragma("foreign_keys = ON");
    if (fresh) database.pragma(`application_id = ${APPLICATION_ID}`);
    return database;
  } catch (error) {
    database?.close();
    throw inWords(error, folder, file);
  }
}

/** SQLite throws away the log beside an empty file; but an empty file with a log is one that has lost its content. */
function refuseBeheaded(file: string): void {
  const size = (path: string): number | undefined => statSync(path, { throwIfNoEntry: false })?.size;
  if (size(file) === 0 && (size(`${file}-wal`) ?? 0) > 0) throw damaged(file, "it is empty");
}

/** Whose the file is: 0 nobody's yet, else ours. */
function checkedIdentity(database: Database.Database, file: string): number {
  const id = Number(database.pragma("application_id", { simple: true }));
  const tables = database.prepare("select count(*) from sqlite_master").pluck().get();
  if (id !== APPLICATION_ID && (id !== 0 || tables !== 0)) {
    throw notStarted(
      `${file} belongs to another program. Nothing was changed; choose another folder by --data.`,
    );
  }
  const found = database.pragma("quick_check(1)", { simple: true });
  if (found !== "ok") throw damaged(file, String(found));
  return id;
}

function damaged(file: string, how: string): DoorError {
  return notStarted(
    `The store ${file} is damaged (${how}). Nothing was changed: move the file away together with the files beside it that bear its name, put back a copy of yours, or choose another folder by --data.`,
  );
}

/** What keeps the file from being used, in words. */
function inWords(error: unknown, folder: string, file: string): unknown {
  const code = error instanceof Error && "code" in error ? String(error.code) : "";
  if (/^SQLITE_(BUSY|LOCKED)/.test(code)) {
    return notStarted(
      `Another emberturn service is using ${folder}. Stop that one first, or give this one a folder of its own by --data.`,
    );
  }
  if (/^SQLITE_(CORRUPT|NOTADB)/.test(code)) return damaged(file, (error as Error).message);
  if (/^SQLITE_FULL|ENOSPC/.test(code)) return notStarted(`There is no room left on the disk of ${folder}.`);
  if (/^(SQLITE_(CANTOPEN|READONLY|IOERR|PERM)|EACCES|EROFS|EPERM|ENOTDIR|ENOENT|EEXIST|EISDIR)/.test(code)) {
    return notStarted(`The data folder ${folder} cannot be written (${code}). Choose another one by --data.`);
  }
  return error;
}

async function migrate(db: Kysely<Tables>, file: string): Promise<void> {
  const migrator = new Migrator({ db, provider: { getMigrations: async () => ({ ...migrations }) } });
  const made = await migrator.getMigrations().catch((error: unknown) => {
    throw inWords(error, file, file);
  });
  const { error } = await migrator.migrateToLatest();
  if (error === undefined) return;
  const newer = error instanceof Error && /previously executed migration/.test(error.message);
  if (newer) {
    throw notStarted(
      `The store ${file} was written by a newer emberturn than this one. Nothing was changed; use the newer one, or another folder by --data.`,
    );
  }
  throw error instanceof Error ? error : new Error(`${made.length} migrations failed: ${String(error)}`);
}
