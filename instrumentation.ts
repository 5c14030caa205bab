/** Start of the server. The file is compiled for every runtime; only Node.js has what the start needs. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME === "nodejs") {
    await (await import("./instrumentation-node")).start();
  }
}
