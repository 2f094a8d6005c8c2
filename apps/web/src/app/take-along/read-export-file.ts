import { EXPORT_FORMAT, type ExportFile } from '@stillstroke/contract/export';
import { IMPORT_BYTES } from '@stillstroke/contract/import';

/**
 * The content of a chosen file, as far as it can be told here that it is an export; the server checks the rest.
 *
 * @throws Error with words for the person
 */
export async function readExportFile(file: File): Promise<ExportFile> {
  // What is sent has a little around the file.
  if (file.size > IMPORT_BYTES - 10_000)
    throw new Error(
      `${file.name} is larger than 24 MB. Export a single session instead of the whole athlete, and bring that in.`,
    );
  let content: unknown;
  try {
    content = JSON.parse(await file.text());
  } catch {
    throw new Error(
      /\.(zip|csv)$/i.test(file.name)
        ? 'Tables cannot be brought back in. Choose the JSON file of the same export.'
        : `${file.name} cannot be read. Choose a JSON file saved with “Take it along”.`,
    );
  }
  const name = (content as { format?: { name?: unknown } } | null)?.format?.name;
  if (name !== EXPORT_FORMAT)
    throw new Error(
      `${file.name} is not a file that Stillstroke exported. Choose a JSON file saved with “Take it along”.`,
    );
  return content as ExportFile;
}
