// Must be refused: a value in the text of a statement is an injection waiting for its day.
type Db = { raw(sql: string, bindings?: unknown[]): unknown; whereRaw(sql: string): unknown };

export const byTemplate = (db: Db, id: string) => db.raw(`select * from job where id = '${id}'`);
export const byAdding = (db: Db, id: string) => db.whereRaw('id = ' + id);
export const allowed = (db: Db, id: string) => db.raw(`select * from job where id = ?`, [id]);
