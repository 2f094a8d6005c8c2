import { IMPORT_BYTES } from '@stillstroke/contract/import';
import { fileName } from '../core/api/download';
import { readExportFile } from './read-export-file';

const fileOf = (name: string, text: string) => new File([text], name);

describe('readExportFile', () => {
  it('takes a file that says it is an export', async () => {
    const text = '{"format":{"name":"stillstroke-export","version":7}}';
    expect(await readExportFile(fileOf('a.json', text))).toEqual(JSON.parse(text));
  });

  it('says what to do about a file that is none', async () => {
    const words = /Choose a JSON file/;
    await expect(readExportFile(fileOf('a.json', '{'))).rejects.toThrow(words);
    await expect(readExportFile(fileOf('a.json', 'null'))).rejects.toThrow(words);
    await expect(readExportFile(fileOf('a.json', '{"format":{"name":"x"}}'))).rejects.toThrow(words);
    await expect(readExportFile(fileOf('a.zip', 'PK'))).rejects.toThrow(/Tables cannot be brought back/);
    const large = new File([new Uint8Array(IMPORT_BYTES)], 'season.json');
    await expect(readExportFile(large)).rejects.toThrow(/larger than 24 MB/);
  });
});

describe('fileName', () => {
  it('is the one that the server gave', () => {
    expect(fileName(`attachment; filename="stillstroke-zoe.json"; filename*=UTF-8''x`)).toBe(
      'stillstroke-zoe.json',
    );
    expect(fileName(null)).toBeNull();
  });
});
