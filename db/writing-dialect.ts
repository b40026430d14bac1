import type Sqlite from 'better-sqlite3';
import {
  CompiledQuery,
  type DatabaseConnection,
  type Driver,
  type QueryResult,
  SelectQueryNode,
  SqliteDialect,
  SqliteDriver,
} from 'kysely';
import { statement } from '@/db/statements';
import { takeTurn } from '@/db/writers-turn';

/** For a database that is written to, from several threads. */
export class WritingDialect extends SqliteDialect {
  constructor(private readonly database: Sqlite.Database) {
    super({ database });
  }

  override createDriver(): Driver {
    return new WritingDriver(this.database);
  }
}

class WritingDriver extends SqliteDriver {
  constructor(private readonly database: Sqlite.Database) {
    super({ database });
  }

  override async acquireConnection(): Promise<DatabaseConnection> {
    return new WritingConnection(this.database, await super.acquireConnection());
  }

  /**
   * Takes the writer's place when a transaction begins. One that begins by reading would be refused at its first write
   * wherever another thread has written in between, without waiting at all: every transaction here goes on to write.
   */
  override async beginTransaction(connection: DatabaseConnection): Promise<void> {
    await connection.executeQuery(CompiledQuery.raw('begin immediate'));
  }
}

/** Keeps the statements of reads prepared, which takes longer than most of them; says when a write waits for its turn. */
class WritingConnection implements DatabaseConnection {
  constructor(
    private readonly database: Sqlite.Database,
    private readonly inner: DatabaseConnection,
  ) {}

  async executeQuery<R>(query: CompiledQuery): Promise<QueryResult<R>> {
    if (!SelectQueryNode.is(query.query)) return takeTurn(() => this.inner.executeQuery<R>(query));
    const parameters = query.parameters as (string | number | null)[];
    return { rows: statement<R>(this.database, query.sql).all(...parameters) };
  }

  streamQuery<R>(query: CompiledQuery, size?: number): AsyncIterableIterator<QueryResult<R>> {
    return this.inner.streamQuery<R>(query, size);
  }
}
