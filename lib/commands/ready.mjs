/** Before `npm test`: what the tests need is installed and the application is built. */
import { build, checkNode, chromium, install, root, say, secrets } from "./steps.mjs";

process.env.NEXT_TELEMETRY_DISABLED = "1";
process.chdir(root);
checkNode();
install();
secrets();
process.env.NODE_ENV = "production";
build();
if (!chromium({ mayInstall: true })) {
  say(
    "No Chromium was found: the browser tests will fail. Install one (Debian: apt-get install chromium) or set CHROMIUM_PATH.",
  );
}
