import { useEffect, useState } from 'react';
import { useLocation, useNavigate } from 'react-router-dom';

/**
 * The token behind the `#` of a letter's link, which browsers send to no server; null where there is none. It is taken
 * out of the address at once, so that it is neither seen over a shoulder nor passed on with a copied address.
 */
export function useLinkToken(): string | null {
  const { hash, pathname } = useLocation();
  const navigate = useNavigate();
  const [token] = useState(() => (hash.length > 20 ? decodeURIComponent(hash.slice(1)) : null));
  useEffect(() => {
    if (hash !== '') void navigate(pathname, { replace: true });
  }, [hash, navigate, pathname]);
  return token;
}
