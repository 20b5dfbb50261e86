import { spawn } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'

/** Nothing of the world outside, no first-run pages, no questions. */
const PREFERENCES = {
  'browser.shell.checkDefaultBrowser': false,
  'browser.startup.homepage_override.mstone': 'ignore',
  'browser.safebrowsing.downloads.enabled': false,
  'datareporting.policy.dataSubmissionEnabled': false,
  'toolkit.telemetry.reportingpolicy.firstRun': false,
  'toolkit.telemetry.enabled': false,
  'app.normandy.enabled': false,
  'app.update.enabled': false,
  'extensions.update.enabled': false,
  'network.captive-portal-service.enabled': false,
  'network.connectivity-service.enabled': false,
  'services.settings.server': 'data:,none',
}

/** Debian's Firefox at an address, without a window; ended by the returned function. */
export function openFirefox(address: string): () => void {
  const profile = mkdtempSync(join(tmpdir(), 'firefox-'))
  writeFileSync(join(profile, 'user.js'), Object.entries(PREFERENCES).map(([name, value]) => `user_pref(${JSON.stringify(name)}, ${JSON.stringify(value)});\n`).join(''))
  // A group of its own: what it starts ends with it.
  const firefox = spawn('/usr/bin/firefox-esr', ['--headless', '--no-remote', '--profile', profile, address], {
    detached: true, stdio: 'ignore', env: { ...process.env, HOME: profile, MOZ_CRASHREPORTER_DISABLE: '1' },
  })
  return () => {
    try {
      if (firefox.pid) process.kill(-firefox.pid, 'SIGKILL')
    }
    catch {
      // It has ended by itself.
    }
    rmSync(profile, { recursive: true, force: true, maxRetries: 5, retryDelay: 100 })
  }
}
