import { mkdir, rename, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { createTransport } from 'nodemailer';
import type { Settings } from '../platform/settings';
import type { Delivery, Dispatch } from './delivery';
import { messageOf } from './message';

type Folder = Pick<Settings, 'dataFolder'>;

const outboxFolder = ({ dataFolder }: Folder) => join(dataFolder, 'outbox');
/** Path of a mail's file, from the data folder. */
export const mailFile = (id: string) => join('outbox', `${id}.eml`);

/** Writes each mail as an .eml file, whole or not at all; a second time it takes the place of the first. */
export function fileDelivery(folder: Folder): Delivery {
  const composer = createTransport({ streamTransport: true, buffer: true, newline: 'windows' });
  return {
    send: async (mail: Dispatch) => {
      try {
        const { message } = (await composer.sendMail(messageOf(mail))) as { message: Buffer };
        await mkdir(outboxFolder(folder), { recursive: true });
        const path = join(folder.dataFolder, mailFile(mail.id));
        // Links in it open accounts: for the owner's eyes alone.
        await writeFile(`${path}.part`, message, { mode: 0o600, flush: true });
        await rename(`${path}.part`, path);
        return { how: 'sent' };
      } catch (error) {
        const code = (error as NodeJS.ErrnoException).code ?? 'unknown reason';
        return {
          how: 'later',
          reason: `The outbox folder in the data folder cannot be written (${code}).`,
          everything: true,
        };
      }
    },
  };
}

/** Removes a mail's file, if there is one. */
export async function dropMailFile({ dataFolder }: Folder, id: string): Promise<void> {
  await rm(join(dataFolder, mailFile(id)), { force: true });
}
