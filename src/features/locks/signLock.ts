/** Search parameter with which the browser comes back from authenticating again. */
export const SIGN_PARAMETER = 'sign'

/** Goes to the identity provider to authenticate again, for this one signature. */
export function authenticateToSign(studyId: string, lockId: string): void {
  const purpose = encodeURIComponent(`lock.approve:${lockId}`)
  const returnTo = encodeURIComponent(`/studies/${studyId}/lock?${SIGN_PARAMETER}=${lockId}`)
  window.location.assign(`/auth/sign?purpose=${purpose}&returnTo=${returnTo}`)
}
