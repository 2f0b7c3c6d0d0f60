// electron-builder's own validation of our configuration; nothing is packed and nothing is fetched.

import { createRequire } from 'node:module';
import { describe, expect, it } from 'vitest';
import { root } from './process.ts';

// An inner path of app-builder-lib, which comes with electron-builder: the validation that its command line runs first.
const { getConfig, validateConfiguration } = createRequire(createRequire(import.meta.url).resolve('electron-builder'))(
  'app-builder-lib/out/util/config/config.js',
);

const quiet = { isEnabled: false, add: () => {} };

describe('electron-builder.yml', () => {
  it('is a configuration that electron-builder accepts', async () => {
    const config = await getConfig(root, null, null);
    await expect(validateConfiguration(config, quiet)).resolves.toBeUndefined();
    expect(config.npmRebuild).toBe(false);
    expect(config.publish).toBeNull();
    expect(config.files).toEqual([{ filter: ['dist/**/*', 'package.json', '!node_modules/**/*'] }]);
  });

  it('closes the doors that Electron leaves open', async () => {
    const { electronFuses } = await getConfig(root, null, null);
    expect(electronFuses).toEqual({
      runAsNode: false,
      enableCookieEncryption: true,
      enableNodeOptionsEnvironmentVariable: false,
      enableNodeCliInspectArguments: false,
      enableEmbeddedAsarIntegrityValidation: true,
      onlyLoadAppFromAsar: true,
      loadBrowserProcessSpecificV8Snapshot: false,
      grantFileProtocolExtraPrivileges: false,
    });
  });

  it('would be refused with a key that does not exist', async () => {
    const config = await getConfig(root, null, null);
    await expect(validateConfiguration({ ...config, bogusKey: 1 }, quiet)).rejects.toThrow('bogusKey');
  });
});
