import { CompiledQuery, SqliteDialect, SqliteDriver, type DatabaseConnection, type Driver } from 'kysely';
import type Sqlite from 'better-sqlite3';

/**
 * Takes the writer's place when a transaction begins. One that begins by reading would be refused at its first write
 * wherever another thread has written in between, without waiting at all: every transaction here goes on to write.
 */
class ImmediateDriver extends SqliteDriver {
  override async beginTransaction(connection: DatabaseConnection): Promise<void> {
    await connection.executeQuery(CompiledQuery.raw('begin immediate'));
  }
}

/** For a database that is written to. */
export class ImmediateDialect extends SqliteDialect {
  constructor(private readonly database: Sqlite.Database) {
    super({ database });
  }

  override createDriver(): Driver {
    return new ImmediateDriver({ database: this.database });
  }
}
