import { fileURLToPath } from "node:url";

const config = {
  turbopack: { root: fileURLToPath(new URL("../../../", import.meta.url)) },
  serverExternalPackages: ["@libsql/client"],
  typescript: { ignoreBuildErrors: false },
};

export default config;
