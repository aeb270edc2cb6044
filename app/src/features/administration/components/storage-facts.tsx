import { useQuery } from '@tanstack/react-query';
import { count } from '#lib/format/number.ts';
import { fileSize } from '#lib/format/time.ts';
import { storageQuery } from '../api/administration.ts';

export function StorageFacts() {
  const { data } = useQuery(storageQuery());
  if (!data) return null;
  return (
    <dl className="facts">
      <dt>Database</dt>
      <dd className="num">
        {data.database.kind}, {fileSize(data.database.bytes)}
      </dd>
      <dt>Uploaded files</dt>
      <dd className="num">
        {count(data.files.files)}, {fileSize(data.files.bytes)}
      </dd>
      <dt>Catalogues</dt>
      <dd className="num">
        {count(data.catalogues)} with {count(data.catalogueRows)} rows, {fileSize(data.tiles.bytes)} of tiles
      </dd>
    </dl>
  );
}
