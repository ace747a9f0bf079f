import { useRef, useState } from 'react';
import type { Signature } from '#shared/signons/signature.ts';
import type { Declaration } from '#shared/signons/signons.api.ts';
import { BigButton, inputClass, Labelled, Screen } from './pieces.tsx';
import { SignatureField } from './SignatureField.tsx';
import { drawnSignatureOf, type Ink, inkRefusal, noInk } from './strokes.ts';

type Typed = { name: string; witness: string };

/** The exact words, and the signature under them: drawn with a finger, or typed before a witness. */
export function SignScreen({
  title,
  signer,
  declaration,
  witness = '',
  children,
  onSign,
  onBack,
}: {
  title: string;
  signer: string;
  declaration: Declaration;
  /** The likely witness, where a supervisor holds the device. */
  witness?: string;
  children?: React.ReactNode;
  onSign: (signature: Signature) => Promise<void>;
  onBack: () => void;
}) {
  const [method, setMethod] = useState<Signature['method']>('drawn');
  const [ink, setInk] = useState<Ink>(noInk);
  const [typed, setTyped] = useState<Typed>({ name: '', witness });
  const [asked, setAsked] = useState(false);
  const sending = useRef(false);
  const [busy, setBusy] = useState(false);
  const inkTrouble = inkRefusal(ink.frame ?? { width: 300, height: 150 }, ink.strokes);
  const sign = async () => {
    setAsked(true);
    const signature = method === 'drawn' ? drawnOf(ink) : typedOf(typed);
    if (!signature) document.getElementById('signature')?.scrollIntoView({ block: 'center' });
    // A second tap while the first is being kept would be a second signature.
    if (!signature || sending.current) return;
    sending.current = true;
    setBusy(true);
    await onSign(signature);
  };
  return (
    <Screen
      title={title}
      actions={
        <>
          <BigButton kind="quiet" className="w-1/3 text-[1.125rem]" disabled={busy} onClick={onBack}>
            Back
          </BigButton>
          <BigButton className="grow text-[1.125rem]" disabled={busy} onClick={() => void sign()}>
            {busy ? 'Keeping…' : 'Sign'}
          </BigButton>
        </>
      }
    >
      {children}
      <div
        lang={declaration.language}
        className="border-l-4 border-zinc bg-sheet py-3 pl-3 pr-2 text-[1.125rem]"
      >
        {declaration.words.map((line) => (
          <p key={line} className="mb-2 last:mb-0">
            {line}
          </p>
        ))}
      </div>
      <p className="my-3">
        Signing: <strong>{signer}</strong>
      </p>
      <div id="signature">
        {method === 'drawn' ? (
          <SignatureField ink={ink} onInk={setInk} trouble={asked ? inkTrouble : null} />
        ) : (
          <TypedFields typed={typed} onTyped={setTyped} asked={asked} />
        )}
      </div>
      <BigButton
        kind="quiet"
        className="mt-2"
        onClick={() => {
          setAsked(false);
          setMethod(method === 'drawn' ? 'typed' : 'drawn');
        }}
      >
        {method === 'drawn' ? 'I can’t draw: type my name before a witness' : 'Draw with a finger instead'}
      </BigButton>
    </Screen>
  );
}

function drawnOf({ frame, strokes }: Ink): Signature | null {
  if (!frame || inkRefusal(frame, strokes)) return null;
  return { method: 'drawn', drawn: drawnSignatureOf(frame, strokes) };
}

function typedOf({ name, witness }: Typed): Signature | null {
  if (nameTrouble(name) || witnessTrouble({ name, witness })) return null;
  return { method: 'typed', typedName: name.trim(), witness: witness.trim() };
}

const nameTrouble = (name: string) => (name.trim().length < 2 ? 'Type your name.' : null);

function witnessTrouble({ name, witness }: Typed): string | null {
  if (witness.trim().length < 2) return 'The witness writes their name.';
  if (witness.trim().toLowerCase() === name.trim().toLowerCase())
    return 'The witness is somebody else than the signer.';
  return null;
}

function TypedFields({
  typed,
  onTyped,
  asked,
}: {
  typed: Typed;
  onTyped: (typed: Typed) => void;
  asked: boolean;
}) {
  return (
    <>
      <Labelled
        id="typed-name"
        label="Your name, typed as your signature"
        trouble={asked ? nameTrouble(typed.name) : null}
      >
        <input
          id="typed-name"
          className={inputClass}
          autoComplete="off"
          maxLength={120}
          aria-describedby="typed-name-trouble"
          value={typed.name}
          onChange={({ target }) => onTyped({ ...typed, name: target.value })}
        />
      </Labelled>
      <Labelled
        id="typed-witness"
        label="Name of the witness"
        help="Somebody who stands beside you and sees you do this."
        trouble={asked ? witnessTrouble(typed) : null}
      >
        <input
          id="typed-witness"
          className={inputClass}
          autoComplete="off"
          maxLength={120}
          aria-describedby="typed-witness-help typed-witness-trouble"
          value={typed.witness}
          onChange={({ target }) => onTyped({ ...typed, witness: target.value })}
        />
      </Labelled>
    </>
  );
}
