import { type Problem } from '@/lib/ingest/problem';

/** A problem after which the rest of the file cannot be read. */
export class CsvFault extends Error {
  constructor(readonly problem: Problem) {
    super(problem.message);
    this.name = 'CsvFault';
  }
}
