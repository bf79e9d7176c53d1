import express from 'express';
import { pages } from '#server/http/pages.ts';

const folder = process.env.EMPTY_APP;
if (!folder) throw new Error('This server is started by "npm run bench".');

const app = express();
app.use(pages(folder));
app.listen(Number(process.env.BENCH_PORT), '127.0.0.1');
