/**
 * The live tests need an app. `npm test` has started one and says where it is; the test runner by itself
 * starts one here, in the same way.
 */
import { provideBrowser } from '../../scripts/browser.mjs';
import { prepareTrial } from '../../scripts/trial.mjs';

export async function setup(): Promise<(() => Promise<void>) | undefined> {
  if (process.env.LINEWRIGHT_URL) return undefined;
  const trial = prepareTrial();
  try {
    await trial.database();
    await trial.schema();
    await trial.build();
    await trial.app();
    // The workers inherit this process's environment.
    Object.assign(process.env, trial.environment, { CHROMIUM_PATH: (await provideBrowser()).path });
  } catch (error) {
    await trial.undo();
    throw error;
  }
  return trial.undo;
}
