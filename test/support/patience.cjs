/** A busy machine is no failure: jest's own five seconds are too few for a database made while the linter runs beside. */
jest.setTimeout(30_000);
