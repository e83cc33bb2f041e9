import { customType, datetime, double } from 'drizzle-orm/mysql-core';

/** An instant in UTC to the millisecond. */
export const instant = (name: string) => datetime(name, { mode: 'date', fsp: 3 });

/** Amperes rms primary. */
export const amps = (name: string) => double(name);

/** Bytes as they are: Drizzle's own varbinary turns them into text. */
export const bytes = customType<{ data: Buffer; config: { length: number } }>({
  dataType: (config) => `varbinary(${config?.length ?? 255})`,
});
