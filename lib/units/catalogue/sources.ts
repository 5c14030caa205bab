/** Sources named in the rows. */
export const SI = "SI Brochure, 9th ed. (2019)";
export const NIST = "NIST SP 811 (2008), app. B";
export const YARD = "International yard and pound agreement (1959)";
export const ISO = "ISO 80000";
export const IT = "5th Int. Conf. on Properties of Steam (1956): cal_IT = 4.1868 J";
export const CODATA = "CODATA 2022";
export const IAU = "IAU 2012 Resolution B2";
export const COMMON = "common practice, no source";
