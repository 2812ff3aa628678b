/** Sources that many quantities of the study share. */
export const ASSUMED = 'Study assumption';
export const TREND = 'Study estimate, scaled from the concept design PTL-TN-002';
