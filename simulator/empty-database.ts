import { createConnection } from 'mysql2/promise';

/** Makes the site's database anew, with nothing in it. */
export async function emptyDatabase(adminUrl: string): Promise<void> {
  const connection = await createConnection(adminUrl);
  try {
    await connection.query('DROP DATABASE IF EXISTS tareline');
    await connection.query('CREATE DATABASE tareline');
  } finally {
    await connection.end();
  }
}
