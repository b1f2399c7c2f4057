import { LinkButton } from '@/components/ui/button';
import { CopyOnce } from '@/components/ui/copy-once';
import { Notice } from '@/components/ui/notice';

/** The one time a token's secret is on screen. */
export function NewToken({ token }: { token: { name: string; secret: string; expiresOn: string } }) {
  return (
    <div className="space-y-5">
      <Notice tone="done" live title={`Token “${token.name}” is made and works until ${token.expiresOn}.`}>
        Copy it now: it is shown this once and only its fingerprint is kept.
      </Notice>
      <CopyOnce
        label="Token"
        button="Copy the token"
        value={token.secret}
        hint={
          <>
            Send it with each request in the header <code className="figures">Authorization</code>, after the word{' '}
            <code className="figures">Bearer</code>.
          </>
        }
      >
        <LinkButton href="/site/tokens">Done, I have kept it</LinkButton>
      </CopyOnce>
    </div>
  );
}
