/** A search that runs when typing rests, and on Enter; the key "/" reaches it. */
import { useEffect, useRef, useState } from 'react';
import { searchFieldRef } from '@/shared/client/lib/search-focus';
import { TextField } from './field';

interface SearchFieldProps {
  label: string;
  value: string;
  onSearch: (text: string) => void;
  hint?: string;
}

const REST_MS = 300;

export function SearchField({ label, value, onSearch, hint }: SearchFieldProps) {
  const [text, setText] = useState(value);
  const search = useRef(onSearch);
  useEffect(() => {
    search.current = onSearch;
  }, [onSearch]);
  useEffect(() => {
    if (text === value) return undefined;
    const timer = setTimeout(() => search.current(text), REST_MS);
    return () => clearTimeout(timer);
  }, [text, value]);
  return (
    <TextField
      label={label}
      hint={hint}
      type="search"
      value={text}
      onChange={setText}
      onSubmit={() => onSearch(text)}
      ref={searchFieldRef}
      isRequired
    />
  );
}
