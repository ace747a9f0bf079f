import { LoadScreen } from './LoadScreen.tsx';
import { PersonScreens, type PersonScreensProps } from './PersonScreens.tsx';
import { useLoad } from './useLoad.ts';

type PersonFlowProps = Omit<PersonScreensProps, 'toSign' | 'onReload'>;

/** Everything that one person signs at one site: the list, the cards, the signature, the receipt, and back to the list. */
export function PersonFlow(props: PersonFlowProps) {
  const { api, onLeave } = props;
  const { value, trouble, reload } = useLoad(api.carrier.personId, api.toSign);
  if (value) return <PersonScreens {...props} toSign={value} onReload={reload} />;
  return (
    <LoadScreen
      trouble={trouble}
      waiting="Fetching what there is to sign…"
      onAgain={reload}
      {...(onLeave ? { onBack: onLeave } : {})}
    />
  );
}
