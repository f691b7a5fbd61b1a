// The product under test: started from the build by `npm start`'s own program, with a data folder of its own.
export const PORT = Number(process.env.E2E_PORT ?? 4720);
export const SITE = `http://127.0.0.1:${PORT}`;
export const DATA_FOLDER = '.data/e2e';
