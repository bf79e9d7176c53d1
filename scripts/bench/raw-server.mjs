// The bare measure of the public box list: Node's own HTTP server and one prepared statement through pg, nothing else.
import http from 'node:http';
import pg from 'pg';

const statement = {
  name: 'boxes',
  text: `select kind.slug, kind.name, kind.summary, kind.guaranteed_grams, kind.price_pence, day.day,
      offer.offered - offer.held - offer.sold as free
    from box_kind kind
    join offer on offer.box_kind_id = kind.id
    join cutting_day day on day.id = offer.cutting_day_id
    where day.state = 'open' and day.day >= current_date and kind.is_active
    order by kind.position, day.day`,
};

const pool = new pg.Pool({ connectionString: process.env.DATABASE_URL, max: 20 });

http
  .createServer((_request, response) => {
    pool.query(statement).then(
      ({ rows }) => response.writeHead(200, { 'content-type': 'application/json' }).end(JSON.stringify(rows)),
      () => response.writeHead(500).end(),
    );
  })
  .listen(Number(process.env.BENCH_PORT), '127.0.0.1');
