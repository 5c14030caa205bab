import "server-only";
import { and, count, eq, gt, lt, min } from "drizzle-orm";
import { write } from "@/db/tx";
import { loginAttempts } from "@/db/schema/people";
import { after, minute, now } from "@/lib/core/clock";
import { sha256 } from "@/lib/core/crypto";
import { CodedError } from "@/lib/core/errors";

/** Attempts without success: ten per account in 15 minutes, and 120 a minute in all accounts together. */
const perAccount = { attempts: 10, within: 15 * minute };
const inAll = { attempts: 120, within: minute };

const accountOf = (email: string) => sha256(email.trim().toLowerCase());

/**
 * Counts an attempt before its password is looked at, so that attempts sent at the same time cannot slip through
 * together. Known and unknown accounts are counted alike. Throws CodedError `too-many-requests` with the member
 * `retryAfter` in seconds.
 */
export async function claimAttempt(email: string): Promise<void> {
  const account = accountOf(email);
  const at = now();
  const wait = await write(async (tx) => {
    await tx.delete(loginAttempts).where(lt(loginAttempts.at, after(at, -perAccount.within)));
    const [own] = await tx
      .select({ n: count(), oldest: min(loginAttempts.at) })
      .from(loginAttempts)
      .where(and(eq(loginAttempts.account, account)));
    if (own && own.n >= perAccount.attempts && own.oldest) {
      return own.oldest.getTime() + perAccount.within - at.getTime();
    }
    const [all] = await tx
      .select({ n: count() })
      .from(loginAttempts)
      .where(gt(loginAttempts.at, after(at, -inAll.within)));
    if (all && all.n >= inAll.attempts) return inAll.within;
    await tx.insert(loginAttempts).values({ account, at });
    return 0;
  });
  if (wait > 0) {
    const retryAfter = Math.max(1, Math.ceil(wait / 1000));
    throw new CodedError(
      "too-many-requests",
      `Too many attempts to sign in. Try again in ${Math.ceil(retryAfter / 60)} min.`,
      [],
      { retryAfter },
    );
  }
}

/** After a success the account's attempts no longer count. */
export async function forgetAttempts(email: string): Promise<void> {
  await write((tx) => tx.delete(loginAttempts).where(eq(loginAttempts.account, accountOf(email))));
}
