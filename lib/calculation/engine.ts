/**
 * Version of the calculation engine, stored with every record. Raised when the same definition and inputs may give
 * other digits than before.
 */
export const engineVersion = "1.0.0";
