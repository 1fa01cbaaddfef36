import { createReadStream, createWriteStream } from 'node:fs';
import { once } from 'node:events';
import { createInterface } from 'node:readline';

/** The tables as JSON lines: `{table, columns}` before the rows of each, every row an array; bytes as {base64}. */

/** Sign-ins end with the product they were made at. */
const leftOut = new Set(['sessions']);
const rowsAtOnce = 200;

/** Values as the database writes them: times and large numbers as text, JSON unread, so that they go back unchanged. */
export async function connectPlain(access) {
  const { createConnection } = await import('mariadb');
  return createConnection({
    ...access,
    timezone: 'Z',
    dateStrings: true,
    jsonStrings: true,
    supportBigNumbers: true,
    bigNumberStrings: true,
    decimalAsNumber: false,
  });
}

function plain(value) {
  return Buffer.isBuffer(value) ? { base64: value.toString('base64') } : value;
}

function stored(value) {
  return value !== null && typeof value === 'object' ? Buffer.from(value.base64, 'base64') : value;
}

async function tableNames(connection) {
  const rows = await connection.query(
    "SELECT TABLE_NAME AS name FROM information_schema.TABLES WHERE TABLE_SCHEMA = DATABASE() AND TABLE_TYPE = 'BASE TABLE' ORDER BY TABLE_NAME",
  );
  return rows.map((row) => row.name).filter((name) => !leftOut.has(name));
}

async function columnNames(connection, table) {
  const rows = await connection.query(
    "SELECT COLUMN_NAME AS name FROM information_schema.COLUMNS WHERE TABLE_SCHEMA = DATABASE() AND TABLE_NAME = ? AND IS_GENERATED = 'NEVER' ORDER BY ORDINAL_POSITION",
    [table],
  );
  return rows.map((row) => row.name);
}

const quoted = (names) => names.map((name) => `\`${name}\``).join(', ');

/** All tables as of one moment into `file`. Returns how many rows. */
export async function writeRows(access, file) {
  const connection = await connectPlain(access);
  const out = createWriteStream(file, { mode: 0o600 });
  const line = async (value) => {
    if (!out.write(`${JSON.stringify(value)}\n`)) await once(out, 'drain');
  };
  let count = 0;
  try {
    await connection.query('SET TRANSACTION ISOLATION LEVEL REPEATABLE READ');
    await connection.query('START TRANSACTION WITH CONSISTENT SNAPSHOT, READ ONLY');
    for (const table of await tableNames(connection)) {
      const columns = await columnNames(connection, table);
      await line({ table, columns });
      const rows = connection.queryStream({
        sql: `SELECT ${quoted(columns)} FROM \`${table}\``,
        rowsAsArray: true,
      });
      for await (const row of rows) {
        await line(row.map(plain));
        count += 1;
      }
    }
    await connection.query('COMMIT');
  } finally {
    await connection.end();
    out.end();
    await once(out, 'close');
  }
  return count;
}

async function insert(connection, table, columns, rows) {
  if (rows.length === 0) return;
  const marks = `(${columns.map(() => '?').join(', ')})`;
  await connection.query(
    `INSERT INTO \`${table}\` (${quoted(columns)}) VALUES ${rows.map(() => marks).join(', ')}`,
    rows.flat(),
  );
}

/** What the migrations themselves put in (the chain's head) gives way; the migrations must be those of this release. */
async function emptyTable(connection, table) {
  const [{ held }] = await connection.query(`SELECT COUNT(*) AS held FROM \`${table}\``);
  if (Number(held) > 0) await connection.query(`DELETE FROM \`${table}\``);
}

async function migrationNames(connection) {
  return (await connection.query('SELECT name FROM migrations ORDER BY name')).map((row) => row.name).join();
}

/** Fills the freshly migrated tables from `file` in one transaction. Returns how many rows. */
export async function readRows(access, file) {
  const connection = await connectPlain(access);
  let count = 0;
  try {
    const release = await migrationNames(connection);
    await connection.query('SET SESSION foreign_key_checks = 0');
    await connection.beginTransaction();
    let head;
    let waiting = [];
    const flush = async () => {
      if (head) await insert(connection, head.table, head.columns, waiting);
      count += waiting.length;
      waiting = [];
    };
    for await (const text of createInterface({ input: createReadStream(file), crlfDelay: Infinity })) {
      const value = JSON.parse(text);
      if (Array.isArray(value)) waiting.push(value.map(stored));
      if (!Array.isArray(value) || waiting.length >= rowsAtOnce) await flush();
      if (Array.isArray(value)) continue;
      head = value;
      await emptyTable(connection, head.table);
    }
    await flush();
    if ((await migrationNames(connection)) !== release)
      throw new Error(
        'The backup was made by another release of Tollgate. Restore it with that release, then start this one on its data directory.',
      );
    await connection.commit();
  } finally {
    await connection.end();
  }
  return count;
}
