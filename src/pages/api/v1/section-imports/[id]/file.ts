import { openFile } from '@/features/imports/file.server';
import { endpoint } from '@/http/endpoint';
import { idParam } from '@/http/params';
import { download } from '@/http/upload';

export const GET = endpoint(
  { summary: 'The file of an import as it was brought', status: 200 },
  async ({ params }, { user }) =>
    download(await openFile(user, idParam(params, 'id', 'This import'), 'file')),
);
