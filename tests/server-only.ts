// Stands in for the package "server-only" where tests import server modules directly.
export {};
