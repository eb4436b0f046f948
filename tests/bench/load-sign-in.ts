const PASSWORD = 'a long pass phrase for tests';

/** A session for each, from addresses of their own. @returns their cookies */
export async function signInAll(product: string, emails: readonly string[]): Promise<readonly string[]> {
  return await Promise.all(emails.map((email, index) => signIn(product, { email, index })));
}

async function signIn(product: string, { email, index }: { email: string; index: number }): Promise<string> {
  const answer = await fetch(`${product}/api/session`, {
    method: 'POST',
    headers: {
      'content-type': 'application/json',
      'sec-fetch-site': 'same-origin',
      'x-forwarded-for': `192.0.2.${index}`,
    },
    body: JSON.stringify({ email, password: PASSWORD }),
  });
  if (answer.status !== 200) throw new Error(`${email} could not sign in: ${answer.status}`);
  return answer.headers.get('set-cookie')?.split(';')[0] ?? '';
}
